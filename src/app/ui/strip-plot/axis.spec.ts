import fc from 'fast-check';
import { axisFor, stacked } from './axis';

describe('the axis of a plot', () => {
  it('goes in steps of 1, 2 or 5 around the values', () => {
    expect(axisFor([7.7, 9.1, 12])).toEqual({ low: 7, high: 13, ticks: [7, 8, 9, 10, 11, 12, 13], decimals: 0 });
    expect(axisFor([0.21, 0.34]).ticks).toEqual([0.18, 0.2, 0.22, 0.24, 0.26, 0.28, 0.3, 0.32, 0.34, 0.36]);
  });

  it('holds every value, whatever it is', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0.01, max: 1e6, noNaN: true }), { minLength: 1 }), (values) => {
        const { low, high } = axisFor(values);
        for (const value of values) expect(low <= value && value <= high).toBe(true);
        expect(high).toBeGreaterThan(low);
      }),
    );
  });

  it('never goes below nothing', () => {
    expect(axisFor([0.2, 14]).low).toBe(0);
  });
});

describe('stacking dots', () => {
  it('puts those that touch above each other and keeps each value where it is', () => {
    expect(stacked([5, 1, 1.1, 1.2], 0.15)).toEqual([
      { value: 1, row: 0 },
      { value: 1.1, row: 1 },
      { value: 1.2, row: 0 },
      { value: 5, row: 0 },
    ]);
  });
});
