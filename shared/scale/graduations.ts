import { DomainError, requireFinite, requirePositive } from '../errors.js';
import type { ImagePoint } from '../geometry/points.js';
import { distance } from '../geometry/points.js';
import type { Graduation } from './calibration.js';

/**
 * Marks set on *consecutive* graduations, in any order: they are numbered along the ruling.
 *
 * @param marks     2 or more, image px, none left out between the first and the last
 * @param spacingUm distance of neighbouring graduations, µm
 * @returns in order along the ruling, the left end at 0 µm (the upper one of an upright ruling)
 * @throws {DomainError} `too-few-graduations`; `not-positive`; `not-finite`
 */
export function graduationsFromMarks(marks: readonly ImagePoint[], spacingUm: number): Graduation[] {
  requirePositive(spacingUm, 'spacingUm');
  requireFinite(
    marks.flatMap((mark) => [mark.x, mark.y]),
    'marks',
  );
  const oneEnd = farthestFrom(marks, marks[0]);
  const otherEnd = farthestFrom(marks, oneEnd);
  if (!oneEnd || !otherEnd || marks.length < 2) {
    throw new DomainError('too-few-graduations', `Has ${marks.length} graduations; needs 2.`, { count: marks.length });
  }
  const oneIsFirst = oneEnd.x - otherEnd.x || oneEnd.y - otherEnd.y;
  const [first, last] = oneIsFirst < 0 ? [oneEnd, otherEnd] : [otherEnd, oneEnd];
  const along = (mark: ImagePoint) => (mark.x - first.x) * (last.x - first.x) + (mark.y - first.y) * (last.y - first.y);
  return [...marks].sort((a, b) => along(a) - along(b)).map((at, index) => ({ at, positionUm: index * spacingUm }));
}

/**
 * Marks that each know which graduation they lie on, so that steps may be left out.
 *
 * @param marks     `index` counts spacings from any first graduation
 * @param spacingUm distance of neighbouring graduations, µm
 * @throws {DomainError} `not-a-count` for an index that isn't whole; `not-positive`
 */
export function graduationsFromIndexedMarks(
  marks: readonly { readonly at: ImagePoint; readonly index: number }[],
  spacingUm: number,
): Graduation[] {
  requirePositive(spacingUm, 'spacingUm');
  return marks.map(({ at, index }) => {
    if (!Number.isInteger(index)) throw new DomainError('not-a-count', `A graduation's number is whole, was ${index}.`);
    return { at, positionUm: index * spacingUm };
  });
}

function farthestFrom(marks: readonly ImagePoint[], from: ImagePoint | undefined): ImagePoint | undefined {
  if (!from) return undefined;
  return marks.reduce((best, mark) => (distance(from, mark) > distance(from, best) ? mark : best), from);
}
