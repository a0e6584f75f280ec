import { DomainError } from '../errors.js';
import { pathLength, pathPointing } from '../geometry/path.js';
import type { ImagePoint } from '../geometry/points.js';
import { combine, expanded, POINTING_PX } from '../scale/uncertainty.js';
import type { Scale } from '../scale/scale.js';
import type { NoteGeometry } from './note.js';
import type { Dimension, Way } from './structures.js';

export interface DimensionMeasure {
  readonly dimension: Dimension;
  /** image px */
  readonly px: number;
  /** µm; null while the picture has no scale */
  readonly um: number | null;
  /** standard uncertainty (k = 1), µm: scale and pointing. The edge belongs to the series. */
  readonly u: number | null;
}

export interface BodyMeasure {
  /** in the order of the way; one that is not drawn yet is missing */
  readonly dimensions: readonly DimensionMeasure[];
  /** length over width; null until both are there */
  readonly q: number | null;
  /** expanded uncertainty of q, k = 2, from the pointing only: a common scale error cancels in a ratio */
  readonly qU: number | null;
}

/**
 * A shorter line says nothing, image px: both of its ends lie within the pointing of one. It counts as not
 * drawn, since no body has a size of nothing.
 */
const SHORTEST_LINE_PX = POINTING_PX;

/**
 * One body's dimensions, from what was drawn on it and the picture's scale.
 *
 * A cross is not reordered: what was drawn along is the length, also when it comes out shorter.
 *
 * @param geometry a shape that fits the way: `along-then-across` takes a cross, or a line while only the
 *   length is drawn; `across` and `along` a line; `along-bend` a path or a line
 * @param scale    null: px and q only, with pixels taken as square
 * @param pointingPx standard uncertainty of each placed point, image px
 * @throws {DomainError} `wrong-shape`; `not-finite`
 * @see JCGM 100:2008 §5.1.2; for q §5.1.6 without the part that both share
 */
export function measureNote(
  geometry: NoteGeometry,
  way: Way,
  scale: Scale | null,
  pointingPx: number = POINTING_PX,
): BodyMeasure {
  const perPixel = scale ? { x: scale.umPerPxX, y: scale.umPerPxY } : { x: 1, y: 1 };
  const drawn = drawnDimensions(geometry, way)
    .map(({ dimension, points }) => {
      const size = pathLength(points, perPixel);
      const pointing = pointingPx * pathPointing(points, perPixel);
      return { dimension, px: pathLength(points), size, pointing };
    })
    .filter(({ px }) => px >= SHORTEST_LINE_PX);
  const length = drawn.find(({ dimension }) => dimension === 'length');
  const width = drawn.find(({ dimension }) => dimension === 'width');
  const q = length && width && width.size > 0 ? length.size / width.size : null;
  return {
    dimensions: drawn.map(({ dimension, px, size, pointing }) => ({
      dimension,
      px,
      um: scale ? size : null,
      u: scale ? combine(pointing, scale.relativeUncertainty * size) : null,
    })),
    q,
    qU:
      q === null || !length || !width
        ? null
        : expanded(combine(length.pointing / width.size, (q * width.pointing) / width.size)),
  };
}

/** Which dimension each drawn line stands for. */
function drawnDimensions(
  geometry: NoteGeometry,
  way: Way,
): { readonly dimension: Dimension; readonly points: readonly ImagePoint[] }[] {
  if (geometry.type === 'cross' && way === 'along-then-across') {
    const { along, across } = geometry;
    const length = { dimension: 'length' as const, points: [along.a, along.b] };
    return across ? [length, { dimension: 'width' as const, points: [across.a, across.b] }] : [length];
  }
  if (geometry.type === 'line') {
    return [{ dimension: way === 'across' ? 'width' : 'length', points: [geometry.a, geometry.b] }];
  }
  if (geometry.type === 'path' && way === 'along-bend') return [{ dimension: 'length', points: geometry.points }];
  throw new DomainError('wrong-shape', `A ${geometry.type} doesn't measure ${way}.`, { shape: geometry.type, way });
}
