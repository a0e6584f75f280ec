import { DomainError } from '../errors.js';
import { requireCount } from './intervals.js';
import { tQuantile } from './student.js';
import { summarise } from './summary.js';

/** Below this Grubbs' test flags too much (NIST/SEMATECH e-Handbook 1.3.5.17.1). */
export const FEWEST_FOR_GRUBBS = 7;

export interface GrubbsResult {
  /** place of the most distant value in the input */
  readonly index: number;
  /** max |x − x̄| / s */
  readonly g: number;
  readonly critical: number;
  /** a question to the observer, never a reason to leave a value out unasked */
  readonly isOutlier: boolean;
}

/**
 * Is the most distant value one outlier? Not to be repeated blindly on the rest.
 *
 * @param values 7 or more values, roughly normal without the outlier
 * @param alpha  level, 0.05 unless said
 * @returns null for fewer values or when all are equal
 * @see Grubbs 1969, Technometrics 11:1–21; NIST/SEMATECH e-Handbook 1.3.5.17.1
 */
export function grubbs(values: readonly number[], alpha = 0.05, sides: 1 | 2 = 2): GrubbsResult | null {
  const summary = summarise(values);
  if (!summary?.sd || summary.n < FEWEST_FOR_GRUBBS) return null;
  let index = 0;
  let largest = -1;
  values.forEach((value, i) => {
    const away = Math.abs(value - summary.mean);
    if (away > largest) [index, largest] = [i, away];
  });
  const g = largest / summary.sd;
  const critical = grubbsCritical(summary.n, alpha, sides);
  return { index, g, critical, isOutlier: g > critical };
}

/** Critical value of G: (n − 1)/√n · √(t²/(n − 2 + t²)) with t at α/(sides·n) and n − 2 degrees of freedom. */
export function grubbsCritical(n: number, alpha: number, sides: 1 | 2): number {
  requireCount(n);
  if (n < 3) throw new DomainError('too-few-values', `Needs 3 values, had ${n}.`, { n });
  const t = tQuantile(1 - alpha / (sides * n), n - 2);
  return ((n - 1) / Math.sqrt(n)) * Math.sqrt((t * t) / (n - 2 + t * t));
}
