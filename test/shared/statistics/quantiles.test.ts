import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { quantile } from '../../../shared/statistics/quantiles.js';
import samples from '../../fixtures/samples.json' with { type: 'json' };
import { codeOf, expectClose } from '../../support/close.js';

describe('quantiles', () => {
  it.each([
    [6, 95.19807], // NIST/SEMATECH e-Handbook 7.2.6.2 prints 95.1981
    [7, 95.19568],
    [8, 95.1972433333],
  ] as const)('of twelve resistivities at 90 %% by type %d', (type, expected) => {
    expectClose(quantile(samples.resistivities, 0.9, type), expected, 1e-10);
  });

  it.each([
    [6, 0.4, 26],
    [7, 0.4, 29],
    [8, 0.25, 18.3333333333],
    [8, 0.4, 27],
    [8, 0.75, 43.3333333333],
  ] as const)('of 15 20 35 40 50 by type %d at %d', (type, p, expected) => {
    // definitions of Hyndman & Fan 1996, worked by hand
    expectClose(quantile([50, 15, 40, 20, 35], p, type), expected, 1e-10);
  });

  it('stay within the sample, grow with p and end at its extremes', () => {
    const values = fc.array(
      fc.integer({ min: -1_000_000, max: 1_000_000 }).map((thousandths) => thousandths / 1000),
      { minLength: 1 },
    );
    const probability = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(values, probability, probability, fc.constantFrom(6, 7, 8), (sample, p, q, type) => {
        const [low, high] = [quantile(sample, Math.min(p, q), type), quantile(sample, Math.max(p, q), type)];
        expect(low).toBeLessThanOrEqual((high as number) + 1e-9);
        expect(quantile(sample, 0, type)).toBe(Math.min(...sample));
        expect(quantile(sample, 1, type)).toBe(Math.max(...sample));
      }),
    );
  });

  it('have no answer for no values and refuse percentages', () => {
    expect(quantile([], 0.5, 7)).toBeNull();
    expect(codeOf(() => quantile([1, 2], 50, 7))).toBe('not-a-probability');
    expect(codeOf(() => quantile([1, NaN], 0.5, 7))).toBe('not-finite');
  });
});
