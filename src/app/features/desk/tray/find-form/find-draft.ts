import { OBSERVATION_KINDS, SENSITIVITIES, type NewFind } from '@shared/contracts/finds';
import type { TrayPicture } from '@shared/contracts/images';
import { VISIBILITIES } from '@shared/permission/can';

export type ObservationKind = NewFind['observation']['kind'];
export type Sensitivity = NewFind['place']['sensitivity'];
export type Visibility = NewFind['visibility'];

/** What the files of the chosen pictures say of a find. */
export interface FromFiles {
  /** local day of the earliest, `2025-11-03` */
  readonly day: string | null;
  /** the pictures are of more than one day */
  readonly severalDays: boolean;
  readonly place: { readonly latitude: number; readonly longitude: number } | null;
}

/** Date and place as the files have them; the place of the first picture that has one. */
export function fromFiles(pictures: readonly TrayPicture[]): FromFiles {
  const days = pictures.flatMap(({ capture }) => (capture?.local ? [capture.local.slice(0, 10)] : [])).toSorted();
  return {
    day: days[0] ?? null,
    severalDays: days.length > 0 && days[0] !== days.at(-1),
    place: rounded(pictures.find(({ exactPlace }) => exactPlace)?.exactPlace ?? null),
  };
}

/** To a millionth of a degree, 0.1 m: finer than any receiver, and readable. */
function rounded(place: TrayPicture['exactPlace']): FromFiles['place'] {
  return place && { latitude: Number(place.latitude.toFixed(6)), longitude: Number(place.longitude.toFixed(6)) };
}

/** Words of fewer letters are *at*, *the*, *near*: they give nothing away. */
const TELLING_LETTERS = 4;

/** This share of the exact words in the public ones gives the place away; a starting value of our own. */
const MOST_SHARED = 0.6;

/** Whether the public words say what only the exact place should. */
export function givesAway(publicWords: string, exactWords: string): boolean {
  const telling = new Set(wordsOf(exactWords).filter((word) => word.length >= TELLING_LETTERS || /\d/.test(word)));
  const said = new Set(wordsOf(publicWords));
  if (telling.size === 0 || said.size === 0) return false;
  return [...telling].filter((word) => said.has(word)).length / telling.size >= MOST_SHARED;
}

function wordsOf(text: string): string[] {
  return text.toLocaleLowerCase().match(/[\p{L}\p{N}]+/gu) ?? [];
}

/** What is taken over with *as last time*. */
export interface LastFind {
  readonly kind: ObservationKind;
  readonly substrate: string;
  readonly exactWords: string;
  readonly publicWords: string;
  readonly sensitivity: Sensitivity;
  readonly visibility: Visibility;
}

/** `held` needs a date that is not taken over, so it becomes private. */
export function lastFindOf(find: NewFind): LastFind {
  return {
    kind: find.observation.kind,
    substrate: find.observation.substrate,
    exactWords: find.place.exact.words,
    publicWords: find.place.publicWords,
    sensitivity: find.place.sensitivity,
    visibility: find.visibility === 'held' ? 'private' : find.visibility,
  };
}

/** In a few words, so that nobody takes over what they cannot see. */
export function lastFindWords(last: LastFind): string {
  return [last.kind, last.substrate, last.exactWords || last.publicWords].filter(Boolean).join(' · ');
}

/** Kept in this browser, for this person. */
export class LastFindMemory {
  private readonly key: string;

  constructor(
    private readonly storage: Pick<Storage, 'getItem' | 'setItem'> | null,
    ownerId: string,
  ) {
    this.key = `last-find-${ownerId}`;
  }

  read(): LastFind | null {
    try {
      return asLastFind(JSON.parse(this.storage?.getItem(this.key) ?? 'null'));
    } catch {
      return null; // storage closed to us, or written by an older Motebook
    }
  }

  write(last: LastFind): void {
    try {
      this.storage?.setItem(this.key, JSON.stringify(last));
    } catch {
      // A full or closed storage only costs the convenience.
    }
  }
}

function asLastFind(kept: unknown): LastFind | null {
  if (typeof kept !== 'object' || kept === null) return null;
  const { kind, substrate, exactWords, publicWords, sensitivity, visibility } = kept as Record<string, unknown>;
  const sound =
    isOneOf(OBSERVATION_KINDS, kind) &&
    isOneOf(SENSITIVITIES, sensitivity) &&
    isOneOf(VISIBILITIES, visibility) &&
    typeof substrate === 'string' &&
    typeof exactWords === 'string' &&
    typeof publicWords === 'string';
  return sound ? { kind, substrate, exactWords, publicWords, sensitivity, visibility } : null;
}

function isOneOf<T extends string>(values: readonly T[], value: unknown): value is T {
  return values.some((one) => one === value);
}
