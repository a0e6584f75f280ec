import type { TrayPicture } from '@shared/contracts/images';

/** Pictures that were probably taken of one find, in the order they were taken. */
export interface TrayGroup {
  readonly key: string;
  /** local day of the first, `2025-11-03`; null where the files say no date */
  readonly day: string | null;
  /** local `10:42` of the first and the last; null as above */
  readonly from: string | null;
  readonly to: string | null;
  readonly pictures: readonly TrayPicture[];
}

/** A longer pause begins a new group; a starting value of our own: nobody stands still so long at one find. */
const PAUSE_MIN = 10;

/** As does a walk of so many metres, where both files carry a place; above what a phone errs under trees. */
const WALK_M = 60;

/**
 * Suggested finds: pictures in order of capture, parted at pauses, at midnight and at walks. What has no date
 * comes last, by name. It only suggests: whoever sorts chooses other pictures as they like.
 */
export function groupPictures(pictures: readonly TrayPicture[]): TrayGroup[] {
  const dated = pictures.filter(({ capture }) => capture?.local).toSorted(byCapture);
  const undated = pictures.filter(({ capture }) => !capture?.local).toSorted(byName);
  const groups: TrayPicture[][] = [];
  for (const picture of dated) {
    const group = groups.at(-1);
    const previous = group?.at(-1);
    if (group && previous && belongTogether(previous, picture)) group.push(picture);
    else groups.push([picture]);
  }
  return [
    ...groups.map(toGroup),
    ...(undated.length > 0 ? [{ key: 'undated', day: null, from: null, to: null, pictures: undated }] : []),
  ];
}

function toGroup(pictures: readonly TrayPicture[]): TrayGroup {
  const first = pictures[0]?.capture?.local ?? '';
  const last = pictures.at(-1)?.capture?.local ?? '';
  return {
    key: pictures[0]?.id ?? '',
    day: first.slice(0, 10),
    from: first.slice(11, 16),
    to: last.slice(11, 16),
    pictures,
  };
}

function belongTogether(a: TrayPicture, b: TrayPicture): boolean {
  const [from, to] = [a.capture?.local ?? '', b.capture?.local ?? ''];
  if (from.slice(0, 10) !== to.slice(0, 10)) return false;
  if (minutes(to) - minutes(from) > PAUSE_MIN) return false;
  return !(a.exactPlace && b.exactPlace && metresApart(a.exactPlace, b.exactPlace) > WALK_M);
}

/** Of a local time as the camera wrote it; both are read as UTC, so that no summer time comes in between. */
function minutes(local: string): number {
  return Date.parse(`${local.slice(0, 19)}Z`) / 60_000;
}

interface Place {
  readonly latitude: number;
  readonly longitude: number;
}

/** Good to 1 % over a walk, which is all that is asked: one degree of latitude is about 111 km. */
function metresApart(a: Place, b: Place): number {
  const north = (b.latitude - a.latitude) * 111_000;
  const east = (b.longitude - a.longitude) * 111_000 * Math.cos((a.latitude * Math.PI) / 180);
  return Math.hypot(north, east);
}

function byCapture(a: TrayPicture, b: TrayPicture): number {
  return (a.capture?.local ?? '').localeCompare(b.capture?.local ?? '') || byName(a, b);
}

function byName(a: TrayPicture, b: TrayPicture): number {
  return a.name.localeCompare(b.name, undefined, { numeric: true });
}
