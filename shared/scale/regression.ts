import { DomainError, requireFinite } from '../errors.js';
import { sum } from '../statistics/summary.js';

export interface LineFit {
  /** y at x = 0; exactly 0 for a fit through the origin */
  readonly intercept: number;
  readonly slope: number;
  /** standard uncertainties; null without degrees of freedom */
  readonly interceptU: number | null;
  readonly slopeU: number | null;
  /** in the unit of y; null without degrees of freedom */
  readonly residualSd: number | null;
  readonly residuals: readonly number[];
  /** share of the variation of y that the line explains; null when y doesn't vary */
  readonly r2: number | null;
  readonly degreesOfFreedom: number;
  /** Σ(x − x̄)² with intercept, Σx² without */
  readonly spread: number;
}

/**
 * Ordinary least squares, y = a + b·x, with all the error in y.
 *
 * @param xs and ys: one or more pairs of the same count
 * @throws {DomainError} `too-few-values` under two pairs; `no-spread` when all x are equal; `not-finite`
 * @see NIST StRD, Norris: certified to 15 digits
 */
export function fitLine(xs: readonly number[], ys: readonly number[]): LineFit {
  requirePairs(xs, ys, 2);
  const n = xs.length;
  const meanX = sum(xs) / n;
  const meanY = sum(ys) / n;
  const dx = xs.map((x) => x - meanX);
  const dy = ys.map((y) => y - meanY);
  const spread = sum(dx.map((x) => x * x));
  if (!(spread > 0)) throw new DomainError('no-spread', 'All x are equal.');
  const slope = sum(dx.map((x, i) => x * (dy[i] as number))) / spread;
  const residuals = dx.map((x, i) => (dy[i] as number) - slope * x);
  const squares = sum(residuals.map((r) => r * r));
  const total = sum(dy.map((y) => y * y));
  const degreesOfFreedom = n - 2;
  const residualSd = degreesOfFreedom > 0 ? Math.sqrt(squares / degreesOfFreedom) : null;
  return {
    intercept: meanY - slope * meanX,
    slope,
    interceptU: residualSd === null ? null : residualSd * Math.sqrt(1 / n + (meanX * meanX) / spread),
    slopeU: residualSd === null ? null : residualSd / Math.sqrt(spread),
    residualSd,
    residuals,
    r2: total > 0 ? 1 - squares / total : null,
    degreesOfFreedom,
    spread,
  };
}

/**
 * The same through the origin, y = b·x: only where zero is known to read zero.
 * R² is against zero, as NIST certifies it.
 *
 * @throws {DomainError} `too-few-values` without pairs; `no-spread` when all x are 0; `not-finite`
 * @see NIST StRD, NoInt1
 */
export function fitLineThroughOrigin(xs: readonly number[], ys: readonly number[]): LineFit {
  requirePairs(xs, ys, 1);
  const spread = sum(xs.map((x) => x * x));
  if (!(spread > 0)) throw new DomainError('no-spread', 'All x are 0.');
  const slope = sum(xs.map((x, i) => x * (ys[i] as number))) / spread;
  const residuals = xs.map((x, i) => (ys[i] as number) - slope * x);
  const squares = sum(residuals.map((r) => r * r));
  const total = sum(ys.map((y) => y * y));
  const degreesOfFreedom = xs.length - 1;
  const residualSd = degreesOfFreedom > 0 ? Math.sqrt(squares / degreesOfFreedom) : null;
  return {
    intercept: 0,
    slope,
    interceptU: null,
    slopeU: residualSd === null ? null : residualSd / Math.sqrt(spread),
    residualSd,
    residuals,
    r2: total > 0 ? 1 - squares / total : null,
    degreesOfFreedom,
    spread,
  };
}

function requirePairs(xs: readonly number[], ys: readonly number[], fewest: number): void {
  if (xs.length !== ys.length) throw new DomainError('not-pairs', `${xs.length} x but ${ys.length} y.`);
  if (xs.length < fewest) throw new DomainError('too-few-values', `Needs ${fewest} pairs.`, { n: xs.length });
  requireFinite(xs, 'x');
  requireFinite(ys, 'y');
}
