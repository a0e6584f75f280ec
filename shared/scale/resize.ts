import { requirePositive } from '../errors.js';
import type { ImagePoint } from '../geometry/points.js';
import { px } from '../geometry/points.js';
import type { Scale } from './scale.js';

interface Size {
  readonly width: number;
  readonly height: number;
}

/**
 * The scale of a reduced or enlarged copy of the whole picture. Only for copies that Motebook made,
 * or whose maker says so: a ratio alone can't tell a reduction from a crop.
 *
 * Heights given, x and y scale separately (rounding to whole pixels makes them differ a little);
 * left out, the aspect is taken as kept.
 *
 * @param fromWidth and toWidth: px, positive
 * @throws {DomainError} `not-positive`
 * @example scaleAfterResize(scale, 6000, 1500) // 0.21505 µm/px becomes 0.86022
 */
export function scaleAfterResize(
  scale: Scale,
  fromWidth: number,
  toWidth: number,
  fromHeight?: number,
  toHeight?: number,
): Scale {
  for (const [name, value] of Object.entries({ fromWidth, toWidth, fromHeight, toHeight })) {
    if (value !== undefined) requirePositive(value, name);
  }
  const ratioX = fromWidth / toWidth;
  const ratioY = fromHeight !== undefined && toHeight !== undefined ? fromHeight / toHeight : ratioX;
  return { ...scale, umPerPxX: scale.umPerPxX * ratioX, umPerPxY: scale.umPerPxY * ratioY };
}

/** A crop leaves the scale as it is; only the origin moves. */
export function scaleAfterCrop(scale: Scale): Scale {
  return scale;
}

/** A point of the whole picture, in the pixels of a crop that begins at `origin`. */
export function pointInCrop(point: ImagePoint, origin: ImagePoint): ImagePoint {
  return px(point.x - origin.x, point.y - origin.y);
}

/**
 * The scale of a region delivered at another size, as the IIIF Image API does.
 * @param regionWidth px of the original; @param outputWidth px of the picture that was sent
 */
export function scaleOfRegion(scale: Scale, regionWidth: number, outputWidth: number): Scale {
  return scaleAfterResize(scale, regionWidth, outputWidth);
}

/** A point of the original, in the pixels of a rendition of the whole. */
export function pointInRendition(point: ImagePoint, original: Size, rendition: Size): ImagePoint {
  return px((point.x * rendition.width) / original.width, (point.y * rendition.height) / original.height);
}
