import { describe, expect, it } from 'vitest';
import { precisionUncertaintyM } from '../../../shared/place/coordinate-precision.js';

describe('the uncertainty of coordinates by their precision', () => {
  // Chapman & Wieczorek 2020, Georeferencing Best Practices, table in §3.4: m at 0°, 30°, 60°, 85°
  const TABLE: readonly (readonly [string, number, readonly number[]])[] = [
    ['1.0°', 1, [156904, 146962, 124605, 112109]],
    ['0.1°', 0.1, [15691, 14697, 12461, 11211]],
    ['0.01°', 0.01, [1570, 1470, 1246, 1121]],
    ['0.001°', 0.001, [157, 147, 125, 112]],
    ['0.0001°', 0.0001, [16, 15, 13, 12]],
    ['0.00001°', 0.00001, [2, 2, 2, 2]],
    ['1′', 1 / 60, [2615, 2450, 2077, 1869]],
    ['0.1′', 0.1 / 60, [262, 245, 208, 187]],
    ['1″', 1 / 3600, [44, 41, 35, 32]],
    ['0.1″', 0.1 / 3600, [5, 5, 4, 4]],
  ];

  it.each(TABLE)('reproduces the printed row for %s within 1 m', (_, precision, printed) => {
    [0, 30, 60, 85].forEach((latitude, i) => {
      expect(Math.abs(precisionUncertaintyM(latitude, precision) - (printed[i] as number))).toBeLessThanOrEqual(1);
    });
  });

  it('reproduces the printed example: 10.27° to two decimals', () => {
    expect(precisionUncertaintyM(10.27, 0.01) / 1000).toBeCloseTo(1.5568, 4);
  });

  it('is the same south and north', () => {
    expect(precisionUncertaintyM(-42, 0.1)).toBe(precisionUncertaintyM(42, 0.1));
  });

  it('refuses what is no latitude and no precision', () => {
    expect(() => precisionUncertaintyM(91, 0.1)).toThrow(expect.objectContaining({ code: 'not-a-latitude' }));
    expect(() => precisionUncertaintyM(Number.NaN, 0.1)).toThrow(expect.objectContaining({ code: 'not-a-latitude' }));
    expect(() => precisionUncertaintyM(50, 0)).toThrow(expect.objectContaining({ code: 'not-positive' }));
  });
});
