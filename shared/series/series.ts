import type { BodyMeasure } from '../annotations/measure.js';
import { requireNotNegative } from '../errors.js';
import { combine, COVERAGE_FACTOR, splitScale, welchSatterthwaite } from '../scale/uncertainty.js';
import { halfWidth95 } from '../statistics/coverage.js';
import type { Interval } from '../statistics/intervals.js';
import { meanInterval } from '../statistics/intervals.js';
import { tQuantile } from '../statistics/student.js';
import type { Summary } from '../statistics/summary.js';
import { summarise } from '../statistics/summary.js';

/** Where the edge of a body was taken: outer dark line, inner, middle of the wall. */
export const EDGE_RULES = ['outer', 'inner', 'middle'] as const;
export type EdgeRule = (typeof EDGE_RULES)[number];

/** What a series is summed up for: µm for the first two, a ratio for q. */
export type SeriesQuantity = 'length' | 'width' | 'q';

export interface SeriesSummary extends Summary {
  readonly quantity: SeriesQuantity;
  /** interval of the mean from the scatter alone, 95 %; null for one body */
  readonly scatterInterval: Interval | null;
  /** the parts of `u`, k = 1; they are in the unit of the mean */
  readonly parts: { readonly scatter: number; readonly scale: number; readonly edge: number };
  /** combined standard uncertainty of the mean */
  readonly u: number;
  /** coverage factor of U: 2, or Student's t where fewer than twenty degrees of freedom make 2 too little */
  readonly k: number;
  /** expanded, k·u: the figure to quote, with its k */
  readonly U: number;
  /** effective degrees of freedom of u; null for no limit */
  readonly degreesOfFreedom: number | null;
  /** what the mean may truly be, 95 %, with Student's t for those degrees and the shape of a tolerance */
  readonly interval95: Interval;
  /** half-width of `interval95` over u: the k that holds 95 % here; null when u is 0 */
  readonly k95: number | null;
}

/**
 * Mean of a series with all that makes it uncertain: u² = (s/√n)² + (scale·mean)² + edge².
 *
 * Scatter shrinks with the number of bodies; the scale's error and the edge's are the same in each of
 * them and don't. In q the scale cancels; the edge doesn't, and its errors along and across are taken
 * as independent. The scatter already holds the pointing, so it is not added; only a single body,
 * which has no scatter, takes its own.
 *
 * @param bodies  of one structure and preparation; those without the quantity are passed over
 * @param options `relativeScale`: standard uncertainty of the scale that they share, a fraction, the
 *   largest when there are several; `limitFraction`: see `Scale`; `edgeUm`: standard uncertainty of each
 *   length from where its edges were taken (`edgeUncertainty`), µm
 * @returns null when no body has the quantity
 * @throws {DomainError} `not-positive`; `not-finite`
 * @see JCGM 100:2008 §4.2.3, §5.1.2, §G.4
 */
export function summariseSeries(
  bodies: readonly BodyMeasure[],
  options: {
    readonly quantity: SeriesQuantity;
    readonly relativeScale: number;
    readonly limitFraction?: number;
    readonly edgeUm?: number;
  },
): SeriesSummary | null {
  const { quantity, relativeScale, limitFraction, edgeUm = 0 } = options;
  requireNotNegative(relativeScale, 'relativeScale');
  requireNotNegative(edgeUm, 'edgeUm');
  const summary = summarise(valuesOf(bodies, quantity));
  if (!summary) return null;

  const common = quantity === 'q' ? NO_SCALE_ERROR : { relativeUncertainty: relativeScale, limitFraction };
  const scale = splitScale(common, summary.mean);
  const scatter =
    summary.sd === null ? singlePointing(bodies, quantity, relativeScale) : summary.sd / Math.sqrt(summary.n);
  const edge = quantity === 'q' ? edgeOfQ(bodies, summary.mean, edgeUm) : edgeUm;
  const parts = { scatter, scale: common.relativeUncertainty * summary.mean, edge };
  const u = combine(parts.scatter, parts.scale, parts.edge);

  // Only the scatter is a sample. The limit has a shape of its own and stays out of the degrees of freedom.
  const scatterDegrees = summary.n > 1 ? summary.n - 1 : null;
  const half = halfWidth95({
    normal: combine(scatter, scale.normal, edge),
    limit: scale.limit,
    degreesOfFreedom: welchSatterthwaite([
      { u: scatter, degreesOfFreedom: scatterDegrees },
      { u: combine(scale.normal, edge), degreesOfFreedom: null },
    ]),
  });
  const effective = welchSatterthwaite([
    { u: scatter, degreesOfFreedom: scatterDegrees },
    { u: combine(parts.scale, edge), degreesOfFreedom: null },
  ]);
  const k = effective < FEWEST_DEGREES_FOR_TWO ? tQuantile(0.975, effective) : COVERAGE_FACTOR;
  return {
    ...summary,
    quantity,
    scatterInterval: summary.sd === null ? null : meanInterval({ mean: summary.mean, sd: summary.sd, n: summary.n }),
    parts,
    u,
    k,
    U: k * u,
    degreesOfFreedom: Number.isFinite(effective) ? effective : null,
    interval95: { low: summary.mean - half, high: summary.mean + half },
    k95: u === 0 ? null : half / u,
  };
}

/** From here on k = 2 holds 94 % or more; JCGM 100:2008 §G.6.6 would let 2 pass from about ten (from memory). */
const FEWEST_DEGREES_FOR_TWO = 20;

const NO_SCALE_ERROR = { relativeUncertainty: 0 };

/** The values of one quantity, in the order of the bodies; bodies without it are left out. */
export function valuesOf(bodies: readonly BodyMeasure[], quantity: SeriesQuantity): number[] {
  return bodies.map((body) => valueOf(body, quantity)).filter((value) => value !== null);
}

function valueOf(body: BodyMeasure, quantity: SeriesQuantity): number | null {
  if (quantity === 'q') return body.q;
  return body.dimensions.find(({ dimension }) => dimension === quantity)?.um ?? null;
}

/** Pointing of the one body that there is: its u without the scale's part. */
function singlePointing(bodies: readonly BodyMeasure[], quantity: SeriesQuantity, relativeScale: number): number {
  const body = bodies.find((candidate) => valueOf(candidate, quantity) !== null);
  if (quantity === 'q') return (body?.qU ?? 0) / 2;
  const measured = body?.dimensions.find(({ dimension }) => dimension === quantity);
  const [um, u] = [measured?.um ?? 0, measured?.u ?? 0];
  return Math.sqrt(Math.max(0, u ** 2 - (relativeScale * um) ** 2));
}

/** u(Q) of edges that are off by `edgeUm` along and across, for the mean body. */
function edgeOfQ(bodies: readonly BodyMeasure[], q: number, edgeUm: number): number {
  const width = summarise(
    valuesOf(
      bodies.filter((body) => body.q !== null),
      'width',
    ),
  );
  return width && width.mean > 0 ? (edgeUm * Math.hypot(1, q)) / width.mean : 0;
}
