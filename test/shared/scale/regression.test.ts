import { describe, expect, it } from 'vitest';
import { fitLine, fitLineThroughOrigin } from '../../../shared/scale/regression.js';
import { codeOf, expectClose } from '../../support/close.js';
import { pairs } from '../../support/nist.js';

describe('straight line', () => {
  it('reaches the certified values of NIST Norris, an ozone monitor against a standard', () => {
    const { x, y } = pairs('Norris');
    expect(x).toHaveLength(36);
    const fit = fitLine(x, y);
    expectClose(fit.intercept, -0.262323073774029, 1e-9);
    expectClose(fit.interceptU, 0.232818234301152, 1e-9);
    expectClose(fit.slope, 1.00211681802045, 1e-9);
    expectClose(fit.slopeU, 0.000429796848199937, 1e-9);
    expectClose(fit.residualSd, 0.884796396144373, 1e-9);
    expectClose(fit.r2, 0.999993745883712, 1e-12);
  });

  it('reaches the certified values of NIST NoInt1 through the origin', () => {
    const { x, y } = pairs('NoInt1');
    expect(x).toHaveLength(11);
    const fit = fitLineThroughOrigin(x, y);
    expectClose(fit.slope, 2.07438016528926, 1e-9);
    expectClose(fit.slopeU, 0.0165289256198347, 1e-9);
    expectClose(fit.residualSd, 3.56753034006338, 1e-9);
  });

  it('has no uncertainty without degrees of freedom', () => {
    expect(fitLine([0, 10], [3, 23])).toMatchObject({ intercept: 3, slope: 2, slopeU: null, residualSd: null });
    expect(fitLineThroughOrigin([2], [6])).toMatchObject({ slope: 3, slopeU: null });
  });

  it('refuses what has no slope', () => {
    expect(codeOf(() => fitLine([1], [2]))).toBe('too-few-values');
    expect(codeOf(() => fitLine([1, 1], [2, 3]))).toBe('no-spread');
    expect(codeOf(() => fitLine([1, 2], [2]))).toBe('not-pairs');
    expect(codeOf(() => fitLine([1, NaN], [2, 3]))).toBe('not-finite');
    expect(codeOf(() => fitLineThroughOrigin([0, 0], [2, 3]))).toBe('no-spread');
  });
});
