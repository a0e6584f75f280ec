import { describe, expect, it } from 'vitest';
import { grubbs, grubbsCritical } from '../../../shared/statistics/grubbs.js';
import { meanInterval } from '../../../shared/statistics/intervals.js';
import { relativeHalfWidth, sampleSize, sampleSizeNormal } from '../../../shared/statistics/sample-size.js';
import { summarise } from '../../../shared/statistics/summary.js';
import type { SampleFigures } from '../../../shared/statistics/welch.js';
import { meanAgainst, pooled, welch } from '../../../shared/statistics/welch.js';
import { codeOf, expectClose } from '../../support/close.js';

const figures = (values: number[]): SampleFigures => summarise(values) as SampleFigures;

describe('interval of a mean', () => {
  it('agrees with the worked output for 195 heat flow values', () => {
    // NIST/SEMATECH e-Handbook 1.4.2.8: 1.972, 3.219e-3, 9.25824…9.26468
    const interval = meanInterval({ mean: 9.26146, sd: 0.02278881, n: 195 });
    expectClose(interval?.t, 1.972268, 1e-6);
    expectClose(interval?.halfWidth, 0.003218623, 1e-6);
    expectClose(interval?.low, 9.258241, 1e-6);
    expectClose(interval?.high, 9.264679, 1e-6);
  });

  it('is wide for three values', () => {
    // Hou, Lau & Wong 1983, as cited by Miller & Miller
    const interval = meanInterval({ mean: 37.8, sd: 0.964365, n: 3 });
    expectClose(interval?.low, 35.40438, 1e-6);
    expectClose(interval?.high, 40.19562, 1e-6);
  });

  it('has no answer for one value', () => {
    expect(meanInterval({ mean: 5, sd: 0, n: 1 })).toBeNull();
    expect(codeOf(() => meanInterval({ mean: NaN, sd: 1, n: 5 }))).toBe('not-finite');
    expect(codeOf(() => meanInterval({ mean: 1, sd: 1, n: 2.5 }))).toBe('not-a-count');
  });
});

describe('a mean against a figure', () => {
  it('agrees with the worked example of wafer particles', () => {
    // data, mean 53.7 and s 6.567: NIST/SEMATECH e-Handbook 7.2.2; the rest computed with another library
    const wafers = figures([50, 48, 44, 56, 61, 52, 53, 55, 67, 51]);
    expectClose(wafers.mean, 53.7, 1e-12);
    expectClose(wafers.sd, 6.56675127, 1e-8);
    const against = meanAgainst(wafers, 50);
    expectClose(against?.t, 1.78176801, 1e-8);
    expectClose(against?.p, 0.10847291, 1e-7);
    const interval = meanInterval(wafers);
    expectClose(interval?.low, 49.00242913, 1e-8);
    expectClose(interval?.high, 58.39757087, 1e-8);
  });

  it('agrees with two more', () => {
    expectClose(meanAgainst({ mean: 9.26146, sd: 0.02278881, n: 195 }, 5)?.t, 2611.2838, 1e-6); // e-Handbook 1.3.5.2
    const small = meanAgainst({ mean: 37.8, sd: 0.964365, n: 3 }, 38.9); // Hou, Lau & Wong 1983
    expectClose(small?.t, -1.975658, 1e-5);
    expectClose(small?.p, 0.186857, 1e-5);
  });
});

describe('two means', () => {
  const us: SampleFigures = { mean: 20.14458, sd: 6.4147, n: 249 };
  const japan: SampleFigures = { mean: 30.48101, sd: 6.10771, n: 79 };

  it('differ by Welch as NIST works out for AUTO83B', () => {
    // NIST/SEMATECH e-Handbook 1.3.5.3.1
    const comparison = welch(us, japan);
    expectClose(comparison?.t, -12.94627, 1e-6);
    expectClose(comparison?.degreesOfFreedom, 136.87499, 1e-6);
    expectClose(comparison?.p, 1.571e-25, 1e-3);
  });

  it('differ with a common spread as worked out there too', () => {
    const comparison = pooled(us, japan);
    expectClose(comparison?.sd, 6.3426, 1e-5);
    expectClose(comparison?.t, -12.62058, 1e-5);
    expectClose(comparison?.degreesOfFreedom, 326, 0);
    expectClose(comparison?.p, 5.27e-30, 2e-3);
  });

  it('of small samples agree with another library', () => {
    const comparison = welch(
      figures([7.1, 7.4, 7.6, 7.2, 7.9, 7.5, 7.3, 7.7, 7.4, 7.8]),
      figures([7.9, 8.3, 8.1, 7.6, 8.4, 8.0, 8.2, 8.6]),
    );
    expectClose(comparison?.t, -4.711464854, 1e-8);
    expectClose(comparison?.degreesOfFreedom, 13.68115001, 1e-8);
    expectClose(comparison?.p, 3.549256899e-4, 1e-8);
    expectClose(comparison?.difference.low, -0.9429053619, 1e-8);
    expectClose(comparison?.difference.high, -0.3520946381, 1e-8);
  });

  it('have no answer without spread', () => {
    expect(welch({ mean: 1, sd: 0, n: 5 }, { mean: 2, sd: 0, n: 5 })).toBeNull();
    expect(welch({ mean: 1, sd: 1, n: 1 }, { mean: 2, sd: 1, n: 5 })).toBeNull();
    expect(meanAgainst({ mean: 1, sd: 0, n: 5 }, 2)).toBeNull();
  });
});

describe("Grubbs' test", () => {
  it('finds the outlier among the uranium isotope readings', () => {
    // NIST/SEMATECH e-Handbook 1.3.5.17.1, after Tietjen & Moore 1972; the eight numbers are from memory
    const readings = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57];
    const oneSided = grubbs(readings, 0.05, 1);
    expectClose(oneSided?.g, 2.46876461, 1e-8);
    expectClose(oneSided?.critical, 2.031652, 1e-7);
    const twoSided = grubbs(readings);
    expectClose(twoSided?.critical, 2.12664509, 1e-7);
    expect(twoSided).toMatchObject({ index: 7, isOutlier: true });
  });

  it.each([
    [5, 1.6714, 1.715],
    [10, 2.1761, 2.29],
    [20, 2.5566, 2.7082],
    [30, 2.7451, 2.9085],
    [50, 2.957, 3.1282],
    [100, 3.2095, 3.3841],
  ])('has the critical values of n = %d', (n, oneSided, twoSided) => {
    // formula: e-Handbook 1.3.5.17.1; figures computed with another library
    expectClose(grubbsCritical(n, 0.05, 1), oneSided, 1e-4 / 2);
    expectClose(grubbsCritical(n, 0.05, 2), twoSided, 1e-4 / 2);
  });

  it('says nothing of six values or of equal ones', () => {
    expect(grubbs([1, 2, 3, 4, 5, 99])).toBeNull();
    expect(grubbs([4, 4, 4, 4, 4, 4, 4])).toBeNull();
    expect(codeOf(() => grubbsCritical(2, 0.05, 2))).toBe('too-few-values');
  });
});

describe('number of bodies', () => {
  it.each([
    [8, 2, 62, 64],
    [10, 2, 97, 99],
    [8, 3, 28, 30],
  ])('for spread %d and error %d is %d, with t %d', (sd, error, normal, student) => {
    // NIST/SEMATECH e-Handbook 7.2.2.2
    expect(sampleSizeNormal(sd, error)).toBe(normal);
    expect(sampleSize(sd, error)).toBe(student);
  });

  it.each([
    [10, 5.37],
    [20, 3.51],
    [21, 3.41],
    [30, 2.8],
    [50, 2.13],
    [100, 1.49],
  ])('%d of 7.5 % spread leave %d % on the mean', (n, percent) => {
    expect((100 * relativeHalfWidth(0.075, n)).toFixed(2)).toBe(percent.toFixed(2)); // worked: t·7.5/√n
  });

  it('refuses an error of nothing', () => {
    expect(codeOf(() => sampleSize(1, 0))).toBe('not-positive');
    expect(codeOf(() => sampleSize(1, 1e-9))).toBe('error-too-small');
  });
});
