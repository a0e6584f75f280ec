import type { BodyMeasure } from '@shared/annotations/measure';
import type { SeriesView } from '@shared/contracts/series';
import type { Scale } from '@shared/scale/scale';
import { summariseSeries, type SeriesQuantity, type SeriesSummary } from '@shared/series/series';

type Body = SeriesView['bodies'][number];

/**
 * A series of the API summed up by the domain. Bodies without a scale are passed over: a mean of some
 * in µm and others in pixels would be no mean.
 *
 * @returns null when no body has the quantity
 */
export function summaryOf(series: Pick<SeriesView, 'bodies'>, quantity: SeriesQuantity): SeriesSummary | null {
  const bodies = series.bodies.filter((body) => quantity === 'q' || body.scaleRelativeUncertainty !== null);
  return summariseSeries(bodies.map(toMeasure), {
    quantity,
    relativeScale: Math.max(0, ...bodies.map((body) => body.scaleRelativeUncertainty ?? 0)),
  });
}

/** The weakest grounds of its bodies: a mean is known no better than its worst part. Null without any scale. */
export function groundsOf(series: Pick<SeriesView, 'bodies'>): Scale['grounds'] | null {
  const grounds = new Set(series.bodies.map((body) => body.grounds));
  return (['estimated', 'referenced', 'calibrated'] as const).find((each) => grounds.has(each)) ?? null;
}

/** µm of one dimension, in the order of the bodies. */
export function valuesUm(series: Pick<SeriesView, 'bodies'>, dimension: 'length' | 'width'): number[] {
  return series.bodies.flatMap((body) => (dimension === 'length' ? body.lengthUm : body.widthUm) ?? []);
}

function toMeasure(body: Body): BodyMeasure {
  const { lengthPx, widthPx, lengthUm, widthUm, lengthU, widthU } = body;
  return {
    dimensions: [
      ...(lengthPx === null ? [] : [{ dimension: 'length' as const, px: lengthPx, um: lengthUm, u: lengthU }]),
      ...(widthPx === null ? [] : [{ dimension: 'width' as const, px: widthPx, um: widthUm, u: widthU }]),
    ],
    q: ratio(lengthUm ?? lengthPx, widthUm ?? widthPx),
    qU: null,
  };
}

function ratio(length: number | null, width: number | null): number | null {
  return length === null || width === null || width === 0 ? null : length / width;
}
