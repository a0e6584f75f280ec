/**
 * What is truly in each rendered picture, written beside it, so that measurements can be judged.
 *
 * Points are in image pixels with pixel edges at whole numbers: the middle of the first pixel is (0.5, 0.5).
 */
import { readFile, writeFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';

export interface TruePoint {
  readonly x: number;
  readonly y: number;
}

export interface TrueBody {
  readonly id: string;
  readonly kind: 'spore' | 'thread' | 'head' | 'ring' | 'animal' | 'cap' | 'finger';
  readonly center: TruePoint;
  /** True size; for a thread, its width alone is of use, and length is along the path. */
  readonly axesUm: { readonly length: number; readonly width: number };
  /** Of a body that leans or is seen from above: what its length in the picture comes to at the picture's scale. */
  readonly seenLengthUm?: number;
  /** Direction of the long axis in the picture, degrees, clockwise from the right (y runs down). */
  readonly angle: number;
  /** µm from the plane in focus, positive towards the lens. */
  readonly focus: number;
  readonly touching?: readonly string[];
  readonly coveredBy?: readonly string[];
  /** Reaches over the border of the picture. */
  readonly cut?: boolean;
  /** Which limit the axes reach. */
  readonly edgeRule: string;
  /** Further points worth marking: base and tip of a stalk, the middle line of a thread. */
  readonly points?: Readonly<Record<string, TruePoint | readonly TruePoint[]>>;
}

export interface TrueGraduation {
  readonly a: TruePoint;
  readonly b: TruePoint;
  readonly positionUm: number;
  readonly long: 'no' | 'fifth' | 'tenth';
}

export interface TruePicture {
  readonly width: number;
  readonly height: number;
  readonly umPerPxX: number;
  readonly umPerPxY: number;
  /** Where the scale holds: a micrograph is flat; in a macro photograph only the plane in focus has this scale. */
  readonly scaleHolds: 'everywhere' | 'plane-in-focus';
  readonly taxon: string | null;
  /** Published sizes that the bodies keep to, with their source. */
  readonly published?: readonly {
    readonly character: string;
    readonly minUm: number;
    readonly maxUm: number;
    readonly source: string;
  }[];
  readonly preparation: string;
  readonly seed: number;
  readonly bodies: readonly TrueBody[];
  readonly graduations?: readonly TrueGraduation[];
}

const path = fileURLToPath(new URL('./truth.json', import.meta.url));

export async function readTruth(): Promise<Record<string, TruePicture>> {
  try {
    return JSON.parse(await readFile(path, 'utf8')) as Record<string, TruePicture>;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return {}; // nothing has been rendered yet
    throw error;
  }
}

export async function writeTruth(file: string, picture: TruePicture): Promise<void> {
  const all = { ...(await readTruth()), [file]: picture };
  const sorted = Object.fromEntries(Object.entries(all).sort(([a], [b]) => a.localeCompare(b)));
  await writeFile(path, `${JSON.stringify(sorted, thousandths, 1)}\n`);
}

function thousandths(_key: string, value: unknown): unknown {
  return typeof value === 'number' ? Number(value.toFixed(value < 1 ? 6 : 3)) : value;
}
