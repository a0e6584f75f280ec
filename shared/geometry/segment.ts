import type { ImagePoint } from './points.js';

/** A straight piece between two image points. */
export interface Segment {
  readonly a: ImagePoint;
  readonly b: ImagePoint;
}

/** Signed extent from a to b along x and y, image px. */
export function extent({ a, b }: Segment): { dx: number; dy: number } {
  return { dx: b.x - a.x, dy: b.y - a.y };
}

/** Length, image px. */
export function segmentLength(segment: Segment): number {
  const { dx, dy } = extent(segment);
  return Math.hypot(dx, dy);
}

/** Direction from a to b, radians from +x towards +y; null for no length. */
export function segmentDirection(segment: Segment): number | null {
  const { dx, dy } = extent(segment);
  return dx === 0 && dy === 0 ? null : Math.atan2(dy, dx);
}

/** Distance of a point from the segment (not from its line), image px. */
export function distanceToSegment(point: ImagePoint, segment: Segment): number {
  const { dx, dy } = extent(segment);
  const squared = dx * dx + dy * dy;
  const along = squared === 0 ? 0 : ((point.x - segment.a.x) * dx + (point.y - segment.a.y) * dy) / squared;
  const held = Math.min(1, Math.max(0, along));
  return Math.hypot(point.x - segment.a.x - held * dx, point.y - segment.a.y - held * dy);
}
