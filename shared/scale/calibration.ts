import { DomainError, requireFinite, requireNotNegative } from '../errors.js';
import type { ImagePoint } from '../geometry/points.js';
import { distance } from '../geometry/points.js';
import { halfWidth95, studentWidening } from '../statistics/coverage.js';
import type { Interval } from '../statistics/intervals.js';
import { fitLine } from './regression.js';
import { combine, POINTING_PX, rectangular } from './uncertainty.js';

/** One marked line of a ruling. */
export interface Graduation {
  /** image px */
  readonly at: ImagePoint;
  /** where it lies on the ruling, µm from any zero */
  readonly positionUm: number;
}

/**
 * Limit between any two marks of a stage micrometer without certificate, µm, whatever the span.
 * Common practice, no source, built on a maker's catalogue figure for glass scales.
 */
export const UNCERTIFICATED_TOLERANCE_UM = 1.5;

/** Shorter references say too little of a pixel, image px. */
export const SHORTEST_REFERENCE_PX = 10;

/** Closer marks can't be two graduations, image px. */
const CLOSEST_GRADUATIONS_PX = 1;

/**
 * Nobody marks a line better than this, however little the marks happen to scatter, image px: half a screen
 * pixel at a four-fold view, rectangular. Common practice, no source.
 */
const LEAST_POINTING_PX = 1 / 8 / Math.sqrt(3);

/** With fewer graduations their own scatter is no measure of pointing: see `fitUncertainty`. */
const FEWEST_FOR_RESIDUALS = 5;

export interface CalibrationFit {
  readonly umPerPx: number;
  /** from the scatter of the marks, µm/px, k = 1 */
  readonly standardUncertaintyFit: number;
  /** of that figure; null when it is from the pointing instead of from a sample */
  readonly degreesOfFreedom: number | null;
  /** from the ruling itself: tolerance/√3 over the span used, µm/px, k = 1 */
  readonly standardUncertaintyReference: number;
  /**
   * Both, as a fraction of `umPerPx`, k = 1. The fit's share is widened by Student's t/1.96, so that
   * k = 2 gives about 95 % however few graduations there were.
   */
  readonly relativeUncertainty: number;
  /** half-width of the ruling's tolerance as a fraction: the part that is a limit, not a spread */
  readonly limitFraction: number;
  /** scatter of the marks along the ruling, image px; null for two marks */
  readonly residualSdPx: number | null;
  readonly spanUm: number;
  readonly spanPx: number;
  readonly count: number;
  /** towards growing positions, radians from +x towards +y (clockwise on screen), −π to π */
  readonly direction: number;
  /** distance of each mark from the fitted place, along the ruling, image px, in input order */
  readonly residualsPx: readonly number[];
  /** 95 % interval of `umPerPx`, fit and tolerance together, µm/px */
  readonly ci95: Interval;
}

/**
 * µm per pixel along one ruling, at whatever angle it lies.
 *
 * Marks are fitted as at = origin + b·position in both coordinates; |b| is then the slope of ordinary
 * least squares of the places projected on the fitted direction, px = a + b·µm, so turning the picture
 * changes nothing. Positions are taken as exact: their common error is the tolerance, which no number
 * of marks averages away.
 *
 * @param graduations 2 or more, in any order, steps may be missing
 * @param toleranceUm limit between any two marks, µm, half-width, rectangular; 0 takes the ruling as exact
 * @param pointingPx  standard uncertainty of each mark, image px; used under five graduations
 * @throws {DomainError} `too-few-graduations`; `coincident-graduations`; `reference-too-short`, under 10 px;
 *   `not-finite`; `not-positive`
 * @see JCGM 100:2008 §5.1.2, §H.3 (a calibration line); u(s) = u(b)/b² for s = 1/b
 */
export function fitCalibration(input: {
  readonly graduations: readonly Graduation[];
  readonly toleranceUm: number;
  readonly pointingPx?: number;
}): CalibrationFit {
  const { graduations, toleranceUm, pointingPx = POINTING_PX } = input;
  requireNotNegative(toleranceUm, 'toleranceUm');
  requireNotNegative(pointingPx, 'pointingPx');
  requireDistinct(graduations);
  const positions = graduations.map((graduation) => graduation.positionUm);
  const x = fitLine(
    positions,
    graduations.map((graduation) => graduation.at.x),
  );
  const y = fitLine(
    positions,
    graduations.map((graduation) => graduation.at.y),
  );
  const pxPerUm = Math.hypot(x.slope, y.slope);
  const spanUm = Math.max(...positions) - Math.min(...positions);
  const spanPx = pxPerUm * spanUm;
  if (!(spanPx >= SHORTEST_REFERENCE_PX)) throw referenceTooShort(spanPx);

  const alongX = x.slope / pxPerUm;
  const alongY = y.slope / pxPerUm;
  const residualsPx = x.residuals.map((dx, i) => dx * alongX + (y.residuals[i] as number) * alongY);
  const count = graduations.length;
  const residualSdPx = count > 2 ? Math.hypot(...residualsPx) / Math.sqrt(count - 2) : null;

  const umPerPx = 1 / pxPerUm;
  const scatter = fitUncertainty(count, residualSdPx, pointingPx);
  const standardUncertaintyFit = scatter.px / Math.sqrt(x.spread) / pxPerUm ** 2;
  const limitFraction = toleranceUm / spanUm;
  const standardUncertaintyReference = umPerPx * rectangular(limitFraction);
  const widened = standardUncertaintyFit * studentWidening(scatter.degreesOfFreedom ?? Infinity);
  const half = halfWidth95({
    normal: standardUncertaintyFit,
    limit: umPerPx * limitFraction,
    degreesOfFreedom: scatter.degreesOfFreedom,
  });
  return {
    umPerPx,
    standardUncertaintyFit,
    degreesOfFreedom: scatter.degreesOfFreedom,
    standardUncertaintyReference,
    relativeUncertainty: combine(widened, standardUncertaintyReference) / umPerPx,
    limitFraction,
    residualSdPx,
    spanUm,
    spanPx,
    count,
    direction: Math.atan2(y.slope, x.slope),
    residualsPx,
    ci95: { low: umPerPx - half, high: umPerPx + half },
  };
}

/**
 * Scatter of one mark. Two marks leave no residual; three or four leave one or two degrees of freedom,
 * where luck may claim almost nothing and Student's t (12.7 and 4.3) almost anything. There the pointing
 * counts, or the residuals where they are worse.
 */
function fitUncertainty(count: number, residualSdPx: number | null, pointingPx: number) {
  if (residualSdPx !== null && count >= FEWEST_FOR_RESIDUALS) {
    return { px: Math.max(residualSdPx, LEAST_POINTING_PX), degreesOfFreedom: count - 2 };
  }
  return { px: Math.max(pointingPx, residualSdPx ?? 0), degreesOfFreedom: null };
}

/** @throws {DomainError} for too few graduations, and for two at one place or of one position */
function requireDistinct(graduations: readonly Graduation[]): void {
  if (graduations.length < 2) {
    throw new DomainError('too-few-graduations', `Has ${graduations.length} graduations; needs 2.`, {
      count: graduations.length,
    });
  }
  requireFinite(
    graduations.flatMap(({ at, positionUm }) => [at.x, at.y, positionUm]),
    'graduations',
  );
  // Sorted by position only neighbours can share one; places along a ruling are then sorted as well.
  const sorted = [...graduations].sort((a, b) => a.positionUm - b.positionUm);
  sorted.slice(1).forEach((next, i) => {
    const previous = sorted[i] as Graduation;
    if (next.positionUm === previous.positionUm || distance(next.at, previous.at) < CLOSEST_GRADUATIONS_PX) {
      throw new DomainError(
        'coincident-graduations',
        `Two graduations lie at (${next.at.x}, ${next.at.y}) or share ${next.positionUm} µm.`,
        { x: next.at.x, y: next.at.y },
      );
    }
  });
}

/** The error of every reference that is too short to say much. */
export function referenceTooShort(spanPx: number): DomainError {
  return new DomainError('reference-too-short', `Spans ${spanPx.toFixed(1)} px; needs ${SHORTEST_REFERENCE_PX}.`, {
    spanPx: Number(spanPx.toFixed(1)),
    neededPx: SHORTEST_REFERENCE_PX,
  });
}

export { graduationsFromIndexedMarks, graduationsFromMarks } from './graduations.js';
export { calibrationScale } from './calibration-scale.js';
