import { describe, expect, it } from 'vitest';
import { normalProbability, normalQuantile, tQuantile, tTwoSidedP } from '../../../shared/statistics/student.js';
import { codeOf, expectClose } from '../../support/close.js';

/** Upper quantiles of Student's t: NIST/SEMATECH e-Handbook 1.3.6.7.2. */
const COLUMNS = [0.9, 0.95, 0.975, 0.99, 0.995];
const TABLE: [number, ...number[]][] = [
  [1, 3.078, 6.314, 12.706, 31.821, 63.657],
  [2, 1.886, 2.92, 4.303, 6.965, 9.925],
  [5, 1.476, 2.015, 2.571, 3.365, 4.032],
  [9, 1.383, 1.833, 2.262, 2.821, 3.25],
  [10, 1.372, 1.812, 2.228, 2.764, 3.169],
  [19, 1.328, 1.729, 2.093, 2.539, 2.861],
  [20, 1.325, 1.725, 2.086, 2.528, 2.845],
  [29, 1.311, 1.699, 2.045, 2.462, 2.756],
  [30, 1.31, 1.697, 2.042, 2.457, 2.75],
  [60, 1.296, 1.671, 2.0, 2.39, 2.66],
  [100, 1.29, 1.66, 1.984, 2.364, 2.626],
  [Infinity, 1.282, 1.645, 1.96, 2.326, 2.576],
];

describe("Student's t", () => {
  it.each(TABLE)('agrees with the printed table at %d degrees of freedom', (degrees, ...row) => {
    expect(COLUMNS.map((p) => tQuantile(p, degrees).toFixed(3))).toEqual(row.map((value) => value.toFixed(3)));
  });

  it('meets the normal distribution without a jump', () => {
    expectClose(tQuantile(0.975, 1e9), tQuantile(0.975, Infinity), 1e-8);
    expectClose(normalQuantile(0.975), 1.959963984540054, 1e-14); // Abramowitz & Stegun 1964, table 26.1
    expectClose(normalQuantile(0.025), -1.959963984540054, 1e-13);
    expectClose(normalProbability(1), 0.841344746068543, 1e-13);
    expectClose(normalProbability(-3), 0.001349898031630095, 1e-12);
  });

  it('gives both tails back that its quantile took', () => {
    for (const degrees of [1, 2.5, 9, 136.9]) {
      for (const p of [0.6, 0.9, 0.975, 0.9999]) {
        expectClose(tTwoSidedP(tQuantile(p, degrees), degrees), 2 * (1 - p), 1e-8);
      }
    }
    expect(tTwoSidedP(0, 5)).toBe(1);
  });

  it('refuses what is no probability and no number of degrees', () => {
    expect(codeOf(() => tQuantile(1, 5))).toBe('not-a-probability');
    expect(codeOf(() => tQuantile(NaN, 5))).toBe('not-a-probability');
    expect(codeOf(() => tQuantile(0.9, 0))).toBe('not-positive');
    expect(codeOf(() => tQuantile(0.9, NaN))).toBe('not-positive');
  });
});
