import { DomainError, requireFinite } from '../errors.js';

/**
 * Ways to define a quantile of a sample (Hyndman & Fan 1996, Am. Stat. 50:361–365):
 * - 6: rank p(n + 1), as in the NIST/SEMATECH e-Handbook 7.2.6.2
 * - 7: rank 1 + (n − 1)p, as in most spreadsheets; Motebook's own unless stated
 * - 8: rank p(n + ⅓) + ⅓, median-unbiased, advised by Hyndman & Fan
 */
export type QuantileType = 6 | 7 | 8;

/**
 * @param values a sample in any order and unit
 * @param p      probability, 0 to 1 inclusive
 * @param type   must always be said beside the number: the three differ visibly at n = 30
 * @returns null for no values
 * @throws {DomainError} `not-a-probability`; `not-finite`
 * @example quantile([15, 20, 35, 40, 50], 0.4, 6) // 26; type 7 says 29
 */
export function quantile(values: readonly number[], p: number, type: QuantileType): number | null {
  if (!(p >= 0 && p <= 1)) throw new DomainError('not-a-probability', `Must lie in 0…1, was ${p}.`);
  requireFinite(values, 'values');
  if (values.length === 0) return null;
  const sorted = [...values].sort((a, b) => a - b);
  const rank = Math.min(sorted.length, Math.max(1, rankOf(p, sorted.length, type)));
  const whole = Math.floor(rank);
  const below = sorted[whole - 1] as number;
  const above = sorted[Math.min(whole, sorted.length - 1)] as number;
  return below + (rank - whole) * (above - below);
}

/** Rank counted from 1, not yet limited to 1…n. */
function rankOf(p: number, n: number, type: QuantileType): number {
  switch (type) {
    case 6:
      return p * (n + 1);
    case 7:
      return 1 + (n - 1) * p;
    case 8:
      return p * (n + 1 / 3) + 1 / 3;
  }
}
