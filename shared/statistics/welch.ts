import { DomainError, requireFinite } from '../errors.js';
import type { Interval } from './intervals.js';
import { requireCount } from './intervals.js';
import { tQuantile, tTwoSidedP } from './student.js';

export interface SampleFigures {
  readonly mean: number;
  /** sample standard deviation (n − 1) */
  readonly sd: number;
  readonly n: number;
}

export interface MeanComparison {
  readonly t: number;
  readonly degreesOfFreedom: number;
  /** two-sided */
  readonly p: number;
  /** 95 % interval of the difference a − b */
  readonly difference: Interval;
}

/**
 * Do two means differ, when their spreads may differ too?
 *
 * @returns null when either sample has under two values or neither has any spread
 * @throws {DomainError} `not-finite`; `not-a-count`
 * @see Welch 1947, Biometrika 34:28–35; NIST/SEMATECH e-Handbook 1.3.5.3
 */
export function welch(a: SampleFigures, b: SampleFigures): MeanComparison | null {
  requireSample(a);
  requireSample(b);
  if (a.n < 2 || b.n < 2) return null;
  const va = (a.sd * a.sd) / a.n;
  const vb = (b.sd * b.sd) / b.n;
  if (va + vb === 0) return null;
  const degreesOfFreedom = (va + vb) ** 2 / (va ** 2 / (a.n - 1) + vb ** 2 / (b.n - 1));
  return compare(a.mean - b.mean, Math.sqrt(va + vb), degreesOfFreedom);
}

/** The same with one common spread; only where that is known beforehand. */
export function pooled(a: SampleFigures, b: SampleFigures): (MeanComparison & { sd: number }) | null {
  requireSample(a);
  requireSample(b);
  const degreesOfFreedom = a.n + b.n - 2;
  if (a.n < 1 || b.n < 1 || degreesOfFreedom < 1) return null;
  const sd = Math.sqrt(((a.n - 1) * a.sd ** 2 + (b.n - 1) * b.sd ** 2) / degreesOfFreedom);
  if (sd === 0) return null;
  return { ...compare(a.mean - b.mean, sd * Math.sqrt(1 / a.n + 1 / b.n), degreesOfFreedom), sd };
}

/** Does a mean differ from a fixed figure? NIST/SEMATECH e-Handbook 7.2.2. */
export function meanAgainst(sample: SampleFigures, figure: number): MeanComparison | null {
  requireSample(sample);
  if (sample.n < 2 || sample.sd === 0) return null;
  return compare(sample.mean - figure, sample.sd / Math.sqrt(sample.n), sample.n - 1);
}

function compare(difference: number, standardError: number, degreesOfFreedom: number): MeanComparison {
  const t = difference / standardError;
  const halfWidth = tQuantile(0.975, degreesOfFreedom) * standardError;
  return {
    t,
    degreesOfFreedom,
    p: tTwoSidedP(t, degreesOfFreedom),
    difference: { low: difference - halfWidth, high: difference + halfWidth },
  };
}

function requireSample(sample: SampleFigures): void {
  requireFinite([sample.mean, sample.sd], 'sample');
  requireCount(sample.n);
  if (sample.sd < 0) throw new DomainError('not-positive', 'A standard deviation is never negative.');
}
