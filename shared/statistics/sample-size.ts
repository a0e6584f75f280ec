import { DomainError, requirePositive } from '../errors.js';
import { normalQuantile, tQuantile } from './student.js';

/**
 * How many bodies until the mean is known to ± error?
 *
 * @param sd    spread between bodies, and
 * @param error half-width wanted, both in one unit (or both in per cent of the mean)
 * @returns whole number of bodies, 2 or more, with Student's t for that number
 * @see NIST/SEMATECH e-Handbook 7.2.2.2: N ≥ (t/δ)²σ²
 * @example sampleSize(8, 2) // 64; the normal 1.96 alone would say 62
 */
export function sampleSize(sd: number, error: number, confidence = 0.95): number {
  const p = 0.5 + confidence / 2;
  let n = Math.max(2, sampleSizeNormal(sd, error, confidence));
  // t falls with n, so the first n that suffices is the answer
  while (tQuantile(p, n - 1) * sd > error * Math.sqrt(n)) n++;
  return n;
}

/** The same with the normal quantile, a first guess that is a little too small. */
export function sampleSizeNormal(sd: number, error: number, confidence = 0.95): number {
  requirePositive(sd, 'sd');
  requirePositive(error, 'error');
  const n = (normalQuantile(0.5 + confidence / 2) * (sd / error)) ** 2;
  if (n > 1e6) throw new DomainError('error-too-small', `Would need ${Math.ceil(n)} bodies.`);
  return Math.ceil(n);
}

/**
 * Half-width of the 95 % interval of a mean, as a fraction of the mean.
 * @param cv spread between bodies as a fraction of the mean
 */
export function relativeHalfWidth(cv: number, n: number): number {
  requirePositive(cv, 'cv');
  if (!(Number.isInteger(n) && n >= 2)) throw new DomainError('too-few-values', `Needs 2 values, had ${n}.`, { n });
  return (tQuantile(0.975, n - 1) * cv) / Math.sqrt(n);
}
