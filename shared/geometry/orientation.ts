import { DomainError } from '../errors.js';
import type { ImagePoint } from './points.js';
import { px } from './points.js';

/** Exif orientation: 1 as stored, 2 mirrored, 3 turned by 180°, … 6 and 8 turned by 90°. */
export type Orientation = 1 | 2 | 3 | 4 | 5 | 6 | 7 | 8;

interface Size {
  readonly width: number;
  readonly height: number;
}

/**
 * Where a point of the stored picture lies once it is upright.
 *
 * @param point in stored pixels, edges at whole numbers (a pixel's index is half a pixel less than its middle)
 * @param size  of the stored picture, px
 * @see Exif 3.0 (CIPA DC-008), tag Orientation
 */
export function toUpright(point: ImagePoint, size: Size, orientation: Orientation): ImagePoint {
  const { x, y } = point;
  const { width: w, height: h } = size;
  switch (orientation) {
    case 1:
      return px(x, y);
    case 2:
      return px(w - x, y);
    case 3:
      return px(w - x, h - y);
    case 4:
      return px(x, h - y);
    case 5:
      return px(y, x);
    case 6:
      return px(h - y, x);
    case 7:
      return px(h - y, w - x);
    case 8:
      return px(y, w - x);
    default:
      throw new DomainError('not-an-orientation', `Exif knows 1 to 8, was ${String(orientation)}.`);
  }
}

/** Size of the picture once it is upright. */
export function uprightSize(size: Size, orientation: Orientation): Size {
  return orientation >= 5 ? { width: size.height, height: size.width } : size;
}
