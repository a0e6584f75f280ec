import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Scale } from '../../../shared/scale/scale.js';
import {
  combine,
  edgeUncertainty,
  expanded,
  lengthBudget,
  rectangular,
  resolution,
  splitScale,
  triangular,
  welchSatterthwaite,
} from '../../../shared/scale/uncertainty.js';
import { tQuantile } from '../../../shared/statistics/student.js';
import { codeOf, expectClose } from '../../support/close.js';

const SCALE: Scale = {
  umPerPxX: 0.215054,
  umPerPxY: 0.215054,
  relativeUncertainty: 0.00043 / 0.215054,
  grounds: 'calibrated',
};

describe('parts of an uncertainty', () => {
  it('come from limits and steps', () => {
    // JCGM 100:2008 §4.3.7, §4.3.9, §F.2.2.1 (paragraphs from memory); worked by hand
    expectClose(rectangular(1.5), 0.8660254, 1e-7);
    expectClose(triangular(1), 0.4082483, 1e-7);
    expectClose(resolution(1), 0.28867513, 1e-7);
    expectClose(Math.SQRT2 * rectangular(0.5), 0.4082483, 1e-7); // two ends to ±½ px
  });

  it('add in quadrature and expand by two', () => {
    expect(combine(3, 4)).toBe(5);
    expect(combine()).toBe(0);
    expect(expanded(0.15)).toBe(0.3);
  });

  it('reproduce the end gauge of the Guide', () => {
    // JCGM 100:2008 §H.1 (inputs from memory): 25, 9.7, 2.9, 16.6 nm; ν 18, 25.6, 50, 2
    const parts = [
      { u: 25, degreesOfFreedom: 18 },
      { u: 9.7, degreesOfFreedom: 25.6 },
      { u: 2.9, degreesOfFreedom: 50 },
      { u: 16.6, degreesOfFreedom: 2 },
    ];
    const u = combine(...parts.map((part) => part.u));
    expectClose(u, 31.67, 1e-3);
    const degrees = welchSatterthwaite(parts);
    expectClose(degrees, 16.7646, 1e-4);
    expectClose(tQuantile(0.995, 16), 2.9208, 1e-4);
    expect(Math.round(tQuantile(0.995, 16) * Math.round(u))).toBe(93);
  });

  it('have no limit of freedom when none is a sample', () => {
    expect(
      welchSatterthwaite([
        { u: 1, degreesOfFreedom: null },
        { u: 2, degreesOfFreedom: Infinity },
      ]),
    ).toBe(Infinity);
    expectClose(
      welchSatterthwaite([
        { u: 1, degreesOfFreedom: 9 },
        { u: 0, degreesOfFreedom: null },
      ]),
      9,
      1e-12,
    );
  });

  it('refuse what is no uncertainty', () => {
    expect(codeOf(() => rectangular(-1))).toBe('not-positive');
    expect(codeOf(() => combine(1, NaN))).toBe('not-finite');
  });
});

describe('budget of a length', () => {
  it('is the product of pixels and scale', () => {
    // 47.3 px (u 0.7), 0.215054 µm/px (u 0.00043), JCGM 100:2008 §5.1.6; two million draws gave 10.1722 ± 0.1518
    const budget = lengthBudget({ lengthPx: { dx: 47.3, dy: 0 }, scale: SCALE, pointingPx: 0.7 / Math.SQRT2 });
    expectClose(budget.lengthUm, 10.1720542, 1e-7);
    expectClose(budget.u, 0.1519056, 1e-6);
    expectClose(budget.U, 0.3038112, 1e-6);
    expectClose(budget.u / budget.lengthUm, 0.0149336, 1e-5);
    expect(budget.contributions.map((part) => part.source)).toEqual(['scale', 'pointing']);
  });

  it('takes the edge as one more part', () => {
    // scale 0.20 %, reading 0.7/47.3 px, edge 0.25 µm of 10.172 µm
    const budget = lengthBudget({
      lengthPx: { dx: 0, dy: -47.3 },
      scale: { ...SCALE, relativeUncertainty: 0.002 },
      pointingPx: 0.7 / Math.SQRT2,
      edgeUm: 0.25,
    });
    expectClose(budget.u / budget.lengthUm, 0.028759, 1e-4);
    expect(budget.contributions.at(-1)).toEqual({ source: 'edge', u: 0.25 });
    expectClose(edgeUncertainty(0.13), 0.10614, 1e-4); // √2·0.13/√3
  });

  it('weighs x and y each by its own scale', () => {
    const scale: Scale = { ...SCALE, umPerPxX: 0.2, umPerPxY: 0.21 };
    const budget = lengthBudget({ lengthPx: { dx: 300, dy: 400 }, scale, pointingPx: 0.5 });
    expectClose(budget.lengthUm, 103.2279, 1e-6); // √(60² + 84²)
    // along x alone only x counts: √2·0.5·0.2
    expectClose(
      lengthBudget({ lengthPx: { dx: 9, dy: 0 }, scale, pointingPx: 0.5 }).contributions[1]?.u,
      0.1414214,
      1e-6,
    );
    expectClose(
      lengthBudget({ lengthPx: { dx: 0, dy: 9 }, scale, pointingPx: 0.5 }).contributions[1]?.u,
      0.1484924,
      1e-6,
    );
  });

  it('does not fall over a length of nothing', () => {
    const budget = lengthBudget({ lengthPx: { dx: 0, dy: 0 }, scale: SCALE, pointingPx: 0.5 });
    expect(budget.lengthUm).toBe(0);
    expectClose(budget.u, Math.SQRT2 * 0.5 * 0.215054, 1e-12);
  });

  it('has a relative pointing part that shrinks as the body grows, and a scale part that does not', () => {
    const extent = fc.double({ min: 1, max: 5000, noNaN: true });
    fc.assert(
      fc.property(extent, extent, fc.double({ min: 1.01, max: 50, noNaN: true }), (dx, dy, k) => {
        const small = lengthBudget({ lengthPx: { dx, dy }, scale: SCALE, pointingPx: 0.5 });
        const large = lengthBudget({ lengthPx: { dx: k * dx, dy: k * dy }, scale: SCALE, pointingPx: 0.5 });
        expectClose(large.contributions[0]!.u, k * small.contributions[0]!.u, 1e-9);
        expectClose(large.contributions[1]!.u, small.contributions[1]!.u, 1e-9);
      }),
    );
  });

  it('lets a tolerance narrow the 95 % interval but not the quoted U', () => {
    const scale: Scale = { ...SCALE, relativeUncertainty: rectangular(0.01), limitFraction: 0.01 };
    const budget = lengthBudget({ lengthPx: { dx: 1000, dy: 0 }, scale, pointingPx: 0 });
    expectClose(budget.U, 2 * 215.054 * 0.01 * 0.57735027, 1e-7);
    expectClose(budget.halfWidth95, 0.95 * 215.054 * 0.01, 1e-9);
  });

  it('never takes a limit as larger than the whole uncertainty of the scale', () => {
    expect(splitScale({ relativeUncertainty: 0.001, limitFraction: 0.5 }, 100).normal).toBe(0);
    expectClose(splitScale({ relativeUncertainty: 0.001, limitFraction: 0.5 }, 100).limit, 0.17320508, 1e-7);
  });

  it('refuses broken input', () => {
    expect(codeOf(() => lengthBudget({ lengthPx: { dx: NaN, dy: 0 }, scale: SCALE, pointingPx: 1 }))).toBe(
      'not-finite',
    );
    expect(codeOf(() => lengthBudget({ lengthPx: { dx: 1, dy: 0 }, scale: SCALE, pointingPx: -1 }))).toBe(
      'not-positive',
    );
  });
});
