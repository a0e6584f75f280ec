/**
 * Points, branded by the space they live in, so that a view pixel can't be passed
 * where an image pixel is meant. Only the bench's viewport converts between them.
 *
 * Image space: pixels of the upright original. Pixel *edges* lie at whole numbers:
 * the middle of the first pixel is (0.5, 0.5), the far corner is (width, height).
 */
export interface ImagePoint {
  readonly x: number;
  readonly y: number;
  readonly space?: 'image';
}

/** A point in CSS pixels of the viewing element. */
export interface ViewPoint {
  readonly x: number;
  readonly y: number;
  readonly space: 'view';
}

/** An image point, in pixels of the upright original. */
export function px(x: number, y: number): ImagePoint {
  return { x, y };
}

/** A point in CSS pixels of the viewing element. */
export function viewPx(x: number, y: number): ViewPoint {
  return { x, y, space: 'view' };
}

/** Distance of two points of one space, in that space's pixels. */
export function distance<P extends ImagePoint | ViewPoint>(a: P, b: P): number {
  return Math.hypot(b.x - a.x, b.y - a.y);
}

/** The point halfway between two image points. */
export function midpoint(a: ImagePoint, b: ImagePoint): ImagePoint {
  return px((a.x + b.x) / 2, (a.y + b.y) / 2);
}
