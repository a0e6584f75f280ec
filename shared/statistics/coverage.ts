import { requireNotNegative } from '../errors.js';
import { normalDensity, normalProbability, normalQuantile, tQuantile } from './student.js';

/**
 * Half-width of the interval that holds 95 %, when an error is the sum of a normal part and
 * a part that lies anywhere within a limit.
 *
 * k = 2 is right for a normal sum only: where a rectangular tolerance dominates, 2u is wider than
 * the tolerance itself. The sum of the two has a closed form, so none of this needs simulation.
 *
 * @param normal standard uncertainty of the normal part, and
 * @param limit  half-width of the rectangular part, one unit; 0 for none
 * @param degreesOfFreedom of the normal part; null when it doesn't come from a sample. A sampled
 *   spread is widened by t/1.96, which is exact without limit and very near with it
 * @throws {DomainError} `not-positive`; `not-finite`
 * @example halfWidth95({ normal: 1, limit: 0 }) // 1.96
 * @example halfWidth95({ normal: 0, limit: 1 }) // 0.95
 */
export function halfWidth95(error: {
  readonly normal: number;
  readonly limit: number;
  readonly degreesOfFreedom?: number | null;
}): number {
  requireNotNegative(error.normal, 'normal');
  requireNotNegative(error.limit, 'limit');
  const degreesOfFreedom = error.degreesOfFreedom ?? Infinity;
  const spread = error.normal * studentWidening(degreesOfFreedom);
  if (spread === 0) return 0.95 * error.limit;
  // so narrow a limit leaves a normal distribution, and dividing by it would lose digits
  if (error.limit < 1e-4 * spread) return Z * Math.hypot(spread, error.limit / Math.sqrt(3));
  let low = 0;
  let high = error.limit + 3 * spread;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (probabilityWithin(middle, spread, error.limit) < 0.95) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

const Z = normalQuantile(0.975);

/** How much wider a 95 % interval of a sampled spread is than of a known one: t/z. */
export function studentWidening(degreesOfFreedom: number): number {
  return tQuantile(0.975, degreesOfFreedom) / Z;
}

/** P(|R + N| ≤ h) for R even within ± limit, N normal: (σ/a)·(G((h + a)/σ) − G((h − a)/σ)) − 1, G′ = Φ. */
function probabilityWithin(h: number, sigma: number, limit: number): number {
  return (sigma / limit) * (integral((h + limit) / sigma) - integral((h - limit) / sigma)) - 1;
}

/** ∫Φ from −∞ to z. */
function integral(z: number): number {
  return z * normalProbability(z) + normalDensity(z);
}
