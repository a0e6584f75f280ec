import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { px } from '../../../shared/geometry/points.js';
import type { Graduation } from '../../../shared/scale/calibration.js';
import {
  calibrationScale,
  fitCalibration,
  graduationsFromIndexedMarks,
  graduationsFromMarks,
  UNCERTIFICATED_TOLERANCE_UM,
} from '../../../shared/scale/calibration.js';
import { codeOf, expectClose } from '../../support/close.js';

/** Eleven graduations of a 1 mm stage micrometer, 100 µm apart, read along x. */
const READINGS = [102.3, 567.1, 1032.9, 1497.2, 1962.8, 2427.9, 2892.6, 3358.4, 3822.7, 4288.5, 4753.2];
const ELEVEN: Graduation[] = READINGS.map((x, i) => ({ at: px(x, 640), positionUm: 100 * i }));

/** The same ruling, turned about a point by an angle. */
function turned(graduations: readonly Graduation[], angle: number, about = px(300, 200)): Graduation[] {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return graduations.map(({ at, positionUm }) => ({
    at: px(
      about.x + c * (at.x - about.x) - s * (at.y - about.y),
      about.y + s * (at.x - about.x) + c * (at.y - about.y),
    ),
    positionUm,
  }));
}

/** A ruling without error, seen by pixels of these sizes. */
function ruling(angle: number, umX: number, umY: number, count = 11): Graduation[] {
  return Array.from({ length: count }, (_, i) => ({
    at: px(50 + (100 * i * Math.cos(angle)) / umX, 80 + (100 * i * Math.sin(angle)) / umY),
    positionUm: 100 * i,
  }));
}

describe('calibration of many graduations', () => {
  it('fits all of them by least squares', () => {
    // px = a + b·µm; s = 1/b, u(s) = u(b)/b², JCGM 100:2008 §5.1.2; figures computed with another library
    const fit = fitCalibration({ graduations: ELEVEN, toleranceUm: 0 });
    expectClose(1 / fit.umPerPx, 4.6510636364, 1e-10);
    expectClose(fit.umPerPx, 0.2150045835068, 1e-12);
    expectClose(fit.residualSdPx, 0.321784795392, 1e-10);
    expectClose(fit.standardUncertaintyFit, 1.4182886e-5, 1e-7);
    expect(fit.degreesOfFreedom).toBe(9);
    expectClose(fit.ci95.low, 0.2149724995895, 1e-10);
    expectClose(fit.ci95.high, 0.2150366674241, 1e-10);
    expect(fit).toMatchObject({ spanUm: 1000, count: 11, direction: 0, standardUncertaintyReference: 0 });
  });

  it('differs from what the two ends alone would say', () => {
    const ends = fitCalibration({ graduations: [ELEVEN[0]!, ELEVEN[10]!], toleranceUm: 0 });
    expectClose(ends.umPerPx, 1000 / (4753.2 - 102.3), 1e-12);
  });

  it('says how far each mark lies from the fitted line', () => {
    const fit = fitCalibration({ graduations: ELEVEN, toleranceUm: 0 });
    // a = 102.25: the first mark lies 0.05 px beyond its place; residuals of a fit add up to nothing
    expectClose(fit.residualsPx[0], 0.05, 1e-9);
    expect(fit.residualsPx).toHaveLength(11);
    expect(fit.residualsPx.reduce((total, residual) => total + residual, 0)).toBeCloseTo(0, 9);
  });

  it('adds the tolerance of the ruling over the span that was used', () => {
    // 1.5/√3 = 0.866 µm: 0.0866 % over 1 mm, JCGM 100:2008 §4.3.7
    const fit = fitCalibration({ graduations: ELEVEN, toleranceUm: UNCERTIFICATED_TOLERANCE_UM });
    expectClose(fit.standardUncertaintyReference / fit.umPerPx, 8.660254e-4, 1e-7);
    const short = fitCalibration({ graduations: ELEVEN.slice(0, 2), toleranceUm: UNCERTIFICATED_TOLERANCE_UM });
    expectClose(short.standardUncertaintyReference / short.umPerPx, 8.660254e-3, 1e-7);
    expect(fit.relativeUncertainty).toBeGreaterThan(8.660254e-4);
    expect(fit.relativeUncertainty).toBeLessThan(8.71e-4); // the fit itself adds 0.007 %
  });

  it('takes the uncertainty of two marks from the pointing', () => {
    // 1 mm over 4650 px, 0.2150537634 µm/px; √2·0.5/4650
    const fit = fitCalibration({
      graduations: [
        { at: px(10, 20), positionUm: 0 },
        { at: px(10, 4670), positionUm: 1000 },
      ],
      toleranceUm: 0,
      pointingPx: 0.5,
    });
    expectClose(fit.umPerPx, 0.2150537634, 1e-9);
    expect(fit.residualSdPx).toBeNull();
    expect(fit.degreesOfFreedom).toBeNull();
    expectClose(fit.relativeUncertainty, (Math.SQRT2 * 0.5) / 4650, 1e-12);
    expectClose(fit.direction, Math.PI / 2, 1e-12);
  });

  it('does not believe a lucky fit of three marks', () => {
    const three = [0, 1, 2].map((i) => ({ at: px(100 + 400 * i, 50), positionUm: 100 * i }));
    const fit = fitCalibration({ graduations: three, toleranceUm: 0 });
    expectClose(fit.residualSdPx, 0, 1e-9);
    expectClose(fit.relativeUncertainty, (Math.SQRT2 * 0.5) / 800, 1e-9);
  });

  it('stays the same when the picture is turned or moved', () => {
    const straight = fitCalibration({ graduations: ELEVEN, toleranceUm: 1.5 });
    fc.assert(
      fc.property(fc.double({ min: -3.1, max: 3.1, noNaN: true }), (angle) => {
        const fit = fitCalibration({ graduations: turned(ELEVEN, angle), toleranceUm: 1.5 });
        expectClose(fit.umPerPx, straight.umPerPx, 1e-11);
        expectClose(fit.residualSdPx, straight.residualSdPx as number, 1e-8);
        expectClose(fit.relativeUncertainty, straight.relativeUncertainty, 1e-9);
        expect(fit.direction).toBeCloseTo(angle, 9);
      }),
    );
  });

  it('does not mind the order of the marks or where zero is', () => {
    const shuffled = [...ELEVEN.slice(4), ...ELEVEN.slice(0, 4)].map(({ at, positionUm }) => ({
      at,
      positionUm: positionUm - 700,
    }));
    expectClose(fitCalibration({ graduations: shuffled, toleranceUm: 0 }).umPerPx, 0.2150045835068, 1e-11);
  });

  it('refuses what says too little', () => {
    const fit = (graduations: Graduation[], toleranceUm = 1.5) =>
      codeOf(() => fitCalibration({ graduations, toleranceUm }));
    expect(fit([])).toBe('too-few-graduations');
    expect(fit([ELEVEN[0]!])).toBe('too-few-graduations');
    expect(
      fit([
        { at: px(0, 0), positionUm: 0 },
        { at: px(9.9, 0), positionUm: 10 },
      ]),
    ).toBe('reference-too-short');
    expect(
      fit([
        { at: px(0, 0), positionUm: 0 },
        { at: px(90, 0), positionUm: 0 },
      ]),
    ).toBe('coincident-graduations');
    expect(fit([...ELEVEN, { at: px(102.9, 640), positionUm: 1 }])).toBe('coincident-graduations');
    expect(fit([{ at: px(NaN, 0), positionUm: 0 }, ELEVEN[5]!])).toBe('not-finite');
    expect(fit(ELEVEN, -1)).toBe('not-positive');
    expect(fit(ELEVEN, NaN)).toBe('not-finite');
  });

  it('tells how much was spanned and how much is needed', () => {
    expect(() =>
      fitCalibration({
        graduations: [
          { at: px(0, 0), positionUm: 0 },
          { at: px(3, 0), positionUm: 10 },
        ],
        toleranceUm: 0,
      }),
    ).toThrow('Spans 3.0 px; needs 10.');
  });
});

describe('marks that happen not to scatter', () => {
  it('claim no better than a person can point: ⅛ px, rectangular, on each mark', () => {
    // six marks each 40 px: Σ(x − x̄)² = 17.5 · 40² px², so u(s)/s = 0.125/√3 / (40·√17.5)
    const graduations = [0, 1, 2, 3, 4, 5].map((i) => ({ at: px(60 + 40 * i, 100), positionUm: 10 * i }));
    const fit = fitCalibration({ graduations, toleranceUm: 0 });
    expectClose(fit.standardUncertaintyFit / fit.umPerPx, 0.07216878 / (40 * Math.sqrt(17.5)), 1e-6);
  });
});

describe('marks to graduations', () => {
  it('numbers consecutive marks along the ruling, whatever their order', () => {
    const marks = [px(30, 31), px(10, 11), px(40, 41), px(20, 21)];
    expect(graduationsFromMarks(marks, 10)).toEqual([
      { at: px(10, 11), positionUm: 0 },
      { at: px(20, 21), positionUm: 10 },
      { at: px(30, 31), positionUm: 20 },
      { at: px(40, 41), positionUm: 30 },
    ]);
    expect(graduationsFromMarks([px(7, 90), px(7, 30)], 10)[0]?.at).toEqual(px(7, 30));
  });

  it('lets marks that know their number leave some out', () => {
    const marks = [
      { at: px(5, 0), index: 0 },
      { at: px(205, 0), index: 4 },
      { at: px(255, 0), index: 5 },
    ];
    const fit = fitCalibration({ graduations: graduationsFromIndexedMarks(marks, 10), toleranceUm: 0 });
    expectClose(fit.umPerPx, 0.2, 1e-12);
    expect(fit.spanUm).toBe(50);
  });

  it('refuses one mark, half numbers and no spacing', () => {
    expect(codeOf(() => graduationsFromMarks([px(1, 1)], 10))).toBe('too-few-graduations');
    expect(codeOf(() => graduationsFromMarks([], 10))).toBe('too-few-graduations');
    expect(codeOf(() => graduationsFromMarks([px(1, 1), px(9, 9)], 0))).toBe('not-positive');
    expect(codeOf(() => graduationsFromIndexedMarks([{ at: px(1, 1), index: 0.5 }], 10))).toBe('not-a-count');
  });
});

describe('scale from rulings', () => {
  const fitOf = (graduations: Graduation[]) => fitCalibration({ graduations, toleranceUm: 1.5 });

  it('takes pixels as square when there is one ruling', () => {
    const scale = calibrationScale([fitOf(ELEVEN)]);
    expect(scale.grounds).toBe('calibrated');
    expect(scale.umPerPxX).toBe(scale.umPerPxY);
    expectClose(scale.umPerPxX, 0.2150045835068, 1e-11);
  });

  it.each([0, 7, -12, 25])('solves x and y apart from two rulings turned by %d°', (degrees) => {
    const angle = (degrees * Math.PI) / 180;
    const scale = calibrationScale([fitOf(ruling(angle, 0.2, 0.21)), fitOf(ruling(angle + Math.PI / 2, 0.2, 0.21))]);
    expectClose(scale.umPerPxX, 0.2, 1e-9);
    expectClose(scale.umPerPxY, 0.21, 1e-9);
    // Δ 300, 400 px: √(60² + 84²)
    expectClose(Math.hypot(300 * scale.umPerPxX, 400 * scale.umPerPxY), 103.2279, 1e-6);
  });

  it('gives the same whichever ruling comes first', () => {
    const [a, b] = [fitOf(ruling(0.1, 0.2, 0.21)), fitOf(ruling(1.5, 0.2, 0.21, 5))];
    const [one, other] = [calibrationScale([a, b]), calibrationScale([b, a])];
    expectClose(one.umPerPxX, other.umPerPxX, 1e-12);
    expectClose(one.umPerPxY, other.umPerPxY, 1e-12);
    expectClose(one.relativeUncertainty, other.relativeUncertainty, 1e-12);
    // never less sure than the worse ruling, which here spans 400 µm: 1.5/√3/400
    expect(one.relativeUncertainty).toBeGreaterThan(2.165e-3);
  });

  it('refuses rulings that lie alike, that lie diagonally, and none', () => {
    expect(codeOf(() => calibrationScale([]))).toBe('too-few-rulings');
    const at = (degrees: number) => fitOf(ruling((degrees * Math.PI) / 180, 0.2, 0.2));
    expect(codeOf(() => calibrationScale([at(0), at(58)]))).toBe('rulings-not-perpendicular');
    expect(calibrationScale([at(0), at(62)]).umPerPxY).toBeCloseTo(0.2, 9);
    expect(codeOf(() => calibrationScale([at(45), at(135)]))).toBe('rulings-diagonal');
    expect(codeOf(() => calibrationScale([at(0), at(90), at(45)]))).toBe('too-many-rulings');
  });
});
