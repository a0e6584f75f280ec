import { DomainError, requireFinite } from '../errors.js';
import type { ImagePoint } from './points.js';

/** What a pixel covers along x and y, any unit; 1 and 1 for a length in px. */
export interface PerPixel {
  readonly x: number;
  readonly y: number;
}

const PIXELS: PerPixel = { x: 1, y: 1 };

/**
 * Length along an open path of straight pieces. A bend drawn with few points reads short: chords cut corners.
 *
 * @param points   2 or more vertices, image px
 * @param perPixel µm per px along x and y; left out, the length is in px
 * @throws {DomainError} `too-few-points`; `not-finite`
 */
export function pathLength(points: readonly ImagePoint[], perPixel: PerPixel = PIXELS): number {
  return pieces(points, perPixel).reduce((total, piece) => total + Math.hypot(piece.x, piece.y), 0);
}

/**
 * How strongly the length depends on the pointing of its vertices: its standard uncertainty, in the
 * unit of the length, for 1 px of standard uncertainty of every vertex in x and y.
 *
 * A vertex within a straight run hardly counts, a sharp corner up to double. Two points give √2 px.
 *
 * @see JCGM 100:2008 §5.1.2: the gradient of the length by every coordinate, in quadrature
 */
export function pathPointing(points: readonly ImagePoint[], perPixel: PerPixel = PIXELS): number {
  const directions = pieces(points, perPixel).map((piece) => {
    const length = Math.hypot(piece.x, piece.y);
    // a piece without length has no direction: nothing to first order
    return length === 0 ? { x: 0, y: 0 } : { x: piece.x / length, y: piece.y / length };
  });
  const still = { x: 0, y: 0 };
  const squares = points.reduce((total, _, i) => {
    const before = directions[i - 1] ?? still;
    const after = directions[i] ?? still;
    return total + ((before.x - after.x) * perPixel.x) ** 2 + ((before.y - after.y) * perPixel.y) ** 2;
  }, 0);
  return squares === 0 ? Math.SQRT2 * Math.max(perPixel.x, perPixel.y) : Math.sqrt(squares);
}

function pieces(points: readonly ImagePoint[], perPixel: PerPixel): { x: number; y: number }[] {
  if (points.length < 2) throw new DomainError('too-few-points', `Has ${points.length} points; needs 2.`);
  requireFinite(
    points.flatMap((point) => [point.x, point.y]),
    'points',
  );
  return points.slice(1).map((point, i) => {
    const before = points[i] as ImagePoint;
    return { x: (point.x - before.x) * perPixel.x, y: (point.y - before.y) * perPixel.y };
  });
}
