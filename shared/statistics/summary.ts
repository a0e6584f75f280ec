import { requireFinite } from '../errors.js';

export interface Summary {
  readonly n: number;
  readonly mean: number;
  /** sample standard deviation (n − 1), in the unit of the values; null for one value */
  readonly sd: number | null;
  readonly min: number;
  readonly max: number;
}

/**
 * Count, mean, sample standard deviation and extremes.
 *
 * Two passes with compensated sums: Σx² − (Σx)²/n loses every digit on values
 * such as 10000000.1 and fails NIST's NumAcc3 and NumAcc4.
 *
 * @param values any unit
 * @returns null for no values
 * @throws {DomainError} `not-finite`
 * @see Chan, Golub & LeVeque 1983, Am. Stat. 37:242–247: corrected two-pass (from memory)
 */
export function summarise(values: readonly number[]): Summary | null {
  requireFinite(values, 'values');
  const n = values.length;
  const first = values[0];
  if (first === undefined) return null;
  // Taking the first value off keeps the digits of values that differ little.
  const mean = first + sum(values.map((value) => value - first)) / n;
  const deviations = values.map((value) => value - mean);
  const squares = sum(deviations.map((deviation) => deviation * deviation));
  const drift = sum(deviations);
  return {
    n,
    mean,
    sd: n < 2 ? null : Math.sqrt(Math.max(0, squares - (drift * drift) / n) / (n - 1)),
    min: values.reduce((least, value) => Math.min(least, value), Infinity),
    max: values.reduce((most, value) => Math.max(most, value), -Infinity),
  };
}

/**
 * Correlation of each value with the next, about the common mean (NIST's r(1)).
 * @returns null under two values or when all are equal
 */
export function lagOneCorrelation(values: readonly number[]): number | null {
  const summary = summarise(values);
  if (!summary?.sd) return null;
  const deviations = values.map((value) => value - summary.mean);
  const products = deviations.slice(1).map((deviation, i) => deviation * (deviations[i] ?? 0));
  return sum(products) / sum(deviations.map((deviation) => deviation * deviation));
}

/** Sum with Neumaier's compensation (1974; from memory), exact to the last digit in practice. */
export function sum(values: readonly number[]): number {
  let total = 0;
  let lost = 0;
  for (const value of values) {
    const next = total + value;
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total;
    total = next;
  }
  return total + lost;
}
