import { DomainError, requireFinite } from '../errors.js';
import type { ImagePoint } from './points.js';
import { px } from './points.js';

/**
 * Area of a simple polygon, either way round.
 *
 * @param points 3 or more vertices, unclosed, image px; edges must not cross
 * @returns px²; times umPerPxX·umPerPxY it is µm²
 * @throws {DomainError} `too-few-points`; `not-finite`
 */
export function polygonArea(points: readonly ImagePoint[]): number {
  return Math.abs(moments(points).twiceArea) / 2;
}

/**
 * Centre of mass of a simple polygon, image px. One without area gives the mean of its vertices.
 * @throws {DomainError} `too-few-points`; `not-finite`
 */
export function polygonCentroid(points: readonly ImagePoint[]): ImagePoint {
  const { origin, twiceArea, x, y } = moments(points);
  if (twiceArea === 0) {
    const n = points.length;
    return px(
      points.reduce((total, point) => total + point.x, 0) / n,
      points.reduce((total, point) => total + point.y, 0) / n,
    );
  }
  return px(origin.x + x / (3 * twiceArea), origin.y + y / (3 * twiceArea));
}

/** Length around, image px. */
export function polygonPerimeter(points: readonly ImagePoint[]): number {
  requirePolygon(points);
  return points.reduce((total, point, i) => {
    const next = points[(i + 1) % points.length] as ImagePoint;
    return total + Math.hypot(next.x - point.x, next.y - point.y);
  }, 0);
}

/** Shoelace sums about the first vertex, so that a small round far from the corner keeps its digits. */
function moments(points: readonly ImagePoint[]) {
  const origin = requirePolygon(points);
  let twiceArea = 0;
  let x = 0;
  let y = 0;
  points.forEach((point, i) => {
    const next = points[(i + 1) % points.length] as ImagePoint;
    const [ax, ay, bx, by] = [point.x - origin.x, point.y - origin.y, next.x - origin.x, next.y - origin.y];
    const cross = ax * by - bx * ay;
    twiceArea += cross;
    x += (ax + bx) * cross;
    y += (ay + by) * cross;
  });
  return { origin, twiceArea, x, y };
}

function requirePolygon(points: readonly ImagePoint[]): ImagePoint {
  const first = points[0];
  if (!first || points.length < 3) throw new DomainError('too-few-points', `Has ${points.length} points; needs 3.`);
  requireFinite(
    points.flatMap((point) => [point.x, point.y]),
    'points',
  );
  return first;
}
