import { describe, expect, it } from 'vitest';
import { lagOneCorrelation, sum, summarise } from '../../../shared/statistics/summary.js';
import { codeOf, expectClose } from '../../support/close.js';
import { univariate } from '../../support/nist.js';

/** Relative tolerances: what a correct computation in double precision reaches on each set. */
const SETS = [
  { name: 'Mavro', n: 50, mean: 1e-13, sd: 1e-9 },
  { name: 'Michelso', n: 100, mean: 1e-13, sd: 1e-9 },
  { name: 'Lew', n: 200, mean: 1e-12, sd: 1e-12 },
  { name: 'Lottery', n: 218, mean: 1e-12, sd: 1e-12 },
  { name: 'NumAcc1', n: 3, mean: 0, sd: 0 },
  { name: 'NumAcc2', n: 1001, mean: 1e-12, sd: 1e-12 },
  { name: 'NumAcc3', n: 1001, mean: 1e-12, sd: 1e-8 },
  { name: 'NumAcc4', n: 1001, mean: 1e-12, sd: 1e-7 },
];

describe('summary', () => {
  it.each(SETS)('reaches the certified values of NIST $name', ({ name, n, mean, sd }) => {
    const set = univariate(name);
    const summary = summarise(set.values);
    expect(summary?.n).toBe(n);
    expectClose(summary?.mean, set.mean, mean);
    expectClose(summary?.sd, set.sd, sd);
    expectClose(lagOneCorrelation(set.values), set.lagOne, Math.max(sd, 1e-9));
  });

  it('reads the certified values that NIST prints', () => {
    // typed from the file of Mavro, so that the reader of the files is itself checked
    expect(univariate('Mavro')).toMatchObject({ mean: 2.001856, sd: 0.000429123454003053, lagOne: 0.937989183438248 });
    expect(univariate('Lew')).toMatchObject({ mean: -177.435, lagOne: -0.307304800605679 });
  });

  it('has no answer for no values, and no spread for one', () => {
    expect(summarise([])).toBeNull();
    expect(summarise([7])).toEqual({ n: 1, mean: 7, sd: null, min: 7, max: 7 });
    expect(lagOneCorrelation([4, 4, 4])).toBeNull();
  });

  it('refuses values that are not numbers', () => {
    expect(codeOf(() => summarise([1, NaN]))).toBe('not-finite');
    expect(codeOf(() => summarise([1, Infinity]))).toBe('not-finite');
  });

  it('keeps small terms beside large ones when adding', () => {
    expect(sum([1, 1e100, 1, -1e100])).toBe(2);
  });
});
