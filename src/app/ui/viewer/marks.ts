import { distance, px, type ImagePoint } from '@shared/geometry/points';

/** A marked graduation; `index` counts graduations along the ruling from any first one. */
export interface RulingMark {
  readonly at: ImagePoint;
  readonly index: number;
}

/** Where the graduation `index` should lie: `zero` + index · `step`, image px. */
export interface RulingLine {
  readonly zero: ImagePoint;
  readonly step: { readonly x: number; readonly y: number };
}

/**
 * The straight, evenly divided line through the marks, by least squares in x and y.
 * It only helps to number and to look; the calibration is fitted elsewhere.
 *
 * @returns null until two marks with different indices are there
 */
export function rulingThrough(marks: readonly RulingMark[]): RulingLine | null {
  const n = marks.length;
  if (n < 2) return null;
  const mean = (of: (mark: RulingMark) => number) => marks.reduce((total, mark) => total + of(mark), 0) / n;
  const [i, x, y] = [mean((m) => m.index), mean((m) => m.at.x), mean((m) => m.at.y)];
  const spread = mean((m) => (m.index - i) ** 2);
  if (spread === 0) return null;
  const step = {
    x: mean((m) => (m.index - i) * (m.at.x - x)) / spread,
    y: mean((m) => (m.index - i) * (m.at.y - y)) / spread,
  };
  return { zero: px(x - i * step.x, y - i * step.y), step };
}

/**
 * Which graduation a new mark is likely to be: the next after one, and from two on the nearest by their
 * spacing. A person changes it where graduations were skipped; later suggestions then follow.
 */
export function suggestIndex(marks: readonly RulingMark[], at: ImagePoint): number {
  const line = rulingThrough(marks);
  if (!line) return marks.length === 0 ? 0 : Math.max(...marks.map((mark) => mark.index)) + 1;
  const { zero, step } = line;
  const squared = step.x ** 2 + step.y ** 2;
  if (squared === 0) return Math.max(...marks.map((mark) => mark.index)) + 1;
  return Math.round(((at.x - zero.x) * step.x + (at.y - zero.y) * step.y) / squared);
}

/** Place in the list of the mark nearest to a point, within `reach` image px; null for none. */
export function markAt(marks: readonly RulingMark[], at: ImagePoint, reach: number): number | null {
  const near = marks
    .map((mark, place) => ({ place, far: distance(mark.at, at) }))
    .filter(({ far }) => far <= reach)
    .sort((a, b) => a.far - b.far)[0];
  return near?.place ?? null;
}

/** Image px by which a mark lies off the line through all of them; what a slip of the hand looks like. */
export function offLine(mark: RulingMark, line: RulingLine): number {
  return distance(mark.at, px(line.zero.x + mark.index * line.step.x, line.zero.y + mark.index * line.step.y));
}
