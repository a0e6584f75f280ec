import { DomainError, requireFinite, requireNotNegative } from '../errors.js';
import { tQuantile } from './student.js';

export interface Interval {
  readonly low: number;
  readonly high: number;
}

/**
 * Confidence interval of a mean: x̄ ± t·s/√n.
 *
 * @param sample     mean, sample standard deviation (n − 1) and size, one unit
 * @param confidence 0.95 unless said
 * @returns null under two values: one value says nothing of its spread
 * @see NIST/SEMATECH e-Handbook 1.3.5.2
 */
export function meanInterval(
  sample: { mean: number; sd: number; n: number },
  confidence = 0.95,
): (Interval & { halfWidth: number; t: number }) | null {
  requireFinite([sample.mean], 'mean');
  requireNotNegative(sample.sd, 'sd');
  requireCount(sample.n);
  if (sample.n < 2) return null;
  const t = tQuantile(0.5 + confidence / 2, sample.n - 1);
  const halfWidth = (t * sample.sd) / Math.sqrt(sample.n);
  return { low: sample.mean - halfWidth, high: sample.mean + halfWidth, halfWidth, t };
}

/** @throws {DomainError} `not-a-count` */
export function requireCount(n: number): void {
  if (!Number.isInteger(n) || n < 0) throw new DomainError('not-a-count', `Must be a whole number, was ${n}.`);
}
