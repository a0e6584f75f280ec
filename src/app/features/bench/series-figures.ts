import { measureNote } from '@shared/annotations/measure';
import type { Note } from '@shared/annotations/note';
import { DIMENSIONS_OF, structureOf, type Dimension } from '@shared/annotations/structures';
import type { BodyView } from '@shared/contracts/series';
import type { ScaleView } from '@shared/contracts/scales';
import { DomainError } from '@shared/errors';
import type { Grounds, Scale } from '@shared/scale/scale';
import type { SeriesSummary } from '@shared/series/series';
import { notation } from '@shared/taxonomy/spore-notation';
import { groundsOf, summaryOf, valuesUm } from '../../core/series-summary';

export interface DimensionFigures {
  readonly dimension: Dimension;
  readonly summary: SeriesSummary;
  readonly values: readonly number[];
}

/** A series in numbers. */
export interface SeriesFigures {
  /** bodies that count below */
  readonly n: number;
  /** `px` where no body has a scale: lengths are then image px, and only ratios mean anything elsewhere */
  readonly unit: 'µm' | 'px';
  /** the weakest grounds among the bodies; `none` goes with px */
  readonly grounds: Grounds;
  readonly dimensions: readonly DimensionFigures[];
  readonly q: SeriesSummary | null;
  /** as descriptions print it; null without scale, and for things of a millimetre and more */
  readonly notation: string | null;
  /** bodies on pictures without scale, left out because others have one */
  readonly leftOut: number;
}

/** From here on the notation, which is for spores and the like, says too little; common practice, no source. */
const NOTATION_BELOW_UM = 1000;

/**
 * @param fruitBodies for the notation's [a/b/c]
 * @returns null for no bodies
 */
export function seriesFigures(
  structure: string,
  bodies: readonly BodyView[],
  fruitBodies: number,
): SeriesFigures | null {
  if (bodies.length === 0) return null;
  const scaled = bodies.filter((body) => body.scaleRelativeUncertainty !== null);
  const unit = scaled.length > 0 ? 'µm' : 'px';
  const series = { bodies: unit === 'µm' ? scaled : bodies.map(inPixels) };
  const dimensions = DIMENSIONS_OF[structureOf(structure)?.way ?? 'along'].flatMap((dimension) => {
    const summary = summaryOf(series, dimension);
    return summary ? [{ dimension, summary, values: valuesUm(series, dimension) }] : [];
  });
  return {
    n: series.bodies.length,
    unit,
    grounds: unit === 'µm' ? (groundsOf(series) ?? 'none') : 'none',
    dimensions,
    q: summaryOf(series, 'q'),
    notation: unit === 'µm' ? printed(scaled, fruitBodies) : null,
    leftOut: bodies.length - series.bodies.length,
  };
}

/**
 * A note of this picture as a body, measured this moment.
 * @returns null when its shape does not fit the structure's way (it was measured otherwise before)
 */
export function bodyOf(note: Note, structure: string, scale: Scale | null): BodyView | null {
  const way = structureOf(structure)?.way;
  if (!way) return null;
  try {
    const { dimensions } = measureNote(note.geometry, way, scale);
    const of = (dimension: Dimension) => dimensions.find((one) => one.dimension === dimension);
    const [length, width] = [of('length'), of('width')];
    return {
      noteId: note.id,
      imageId: note.imageId,
      grounds: scale?.grounds ?? 'none',
      scaleRelativeUncertainty: scale?.relativeUncertainty ?? null,
      lengthPx: length?.px ?? null,
      widthPx: width?.px ?? null,
      lengthUm: length?.um ?? null,
      widthUm: width?.um ?? null,
      lengthU: length?.u ?? null,
      widthU: width?.u ?? null,
    };
  } catch (error) {
    // `wrong-shape`: a structure's way may change from one version to the next, and old notes stay as drawn
    if (error instanceof DomainError) return null;
    throw error;
  }
}

/** A scale as the domain computes with it; null where there is none. */
export function scaleOf(view: ScaleView | null): Scale | null {
  if (!view || view.grounds === 'none') return null;
  const { umPerPxX, umPerPxY, relativeUncertainty, grounds } = view;
  if (umPerPxX === null || umPerPxY === null || relativeUncertainty === null) return null;
  return { umPerPxX, umPerPxY, relativeUncertainty, grounds };
}

/** The same body with a pixel as its unit. */
function inPixels(body: BodyView): BodyView {
  return {
    ...body,
    lengthUm: body.lengthPx,
    widthUm: body.widthPx,
    lengthU: 0,
    widthU: 0,
    scaleRelativeUncertainty: 0,
  };
}

function printed(bodies: readonly BodyView[], fruitBodies: number): string | null {
  const sizes = bodies.flatMap(({ lengthUm, widthUm }) => {
    // what has one dimension only stands as a single figure, whichever it is
    const first = lengthUm ?? widthUm;
    return first === null || first <= 0 ? [] : [{ lengthUm: first, widthUm: lengthUm === null ? null : widthUm }];
  });
  if (sizes.some(({ lengthUm, widthUm }) => lengthUm >= NOTATION_BELOW_UM || widthUm === 0)) return null;
  return notation({ bodies: sizes, fruitBodies, collections: 1, roundTo: 0.1 });
}
