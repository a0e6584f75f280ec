import { describe, expect, it } from 'vitest';
import { measureNote } from '../../shared/annotations/measure.js';
import { px } from '../../shared/geometry/points.js';
import { calibrationScale, fitCalibration } from '../../shared/scale/calibration.js';
import { lengthBudget, POINTING_PX } from '../../shared/scale/uncertainty.js';
import type { Scale } from '../../shared/scale/scale.js';
import { summariseSeries } from '../../shared/series/series.js';
import { halfWidth95 } from '../../shared/statistics/coverage.js';
import { meanInterval } from '../../shared/statistics/intervals.js';
import { summarise } from '../../shared/statistics/summary.js';
import { codeOf, expectClose } from '../support/close.js';
import type { Random } from '../support/random.js';
import { seeded } from '../support/random.js';

/*
 * Do the stated 95 % intervals hold the truth in 95 of 100 repeats? Everything is drawn anew each time:
 * the micrometer's own error within its tolerance, the pointing at every graduation, the pointing at
 * both ends of every body. 2,000 repeats scatter by 0.5 % (√(0.95·0.05/2000)).
 */
const REPEATS = 2_000;
const TRUE_UM_PER_PX = 0.215;
const POINTING_SD_PX = 0.5;
const TOLERANCE_UM = 1.5;

interface Setup {
  readonly graduations: number;
  readonly spacingUm: number;
  readonly toleranceUm: number;
  /** whether the micrometer errs at all */
  readonly errs: boolean;
}

/** The usual 1 mm slide, eleven marks. */
const WHOLE: Setup = { graduations: 11, spacingUm: 100, toleranceUm: TOLERANCE_UM, errs: true };

/** A new calibration, by somebody who points at a ruling that lies at some angle. */
function calibrate(random: Random, setup: Setup) {
  const span = (setup.graduations - 1) * setup.spacingUm;
  const stretch = setup.errs ? 1 + random.within(setup.toleranceUm) / span : 1;
  const angle = random.within(0.1);
  const graduations = Array.from({ length: setup.graduations }, (_, i) => {
    const positionUm = i * setup.spacingUm;
    const along = (positionUm * stretch) / TRUE_UM_PER_PX;
    return { at: pointedAt(random, 200 + along * Math.cos(angle), 900 + along * Math.sin(angle)), positionUm };
  });
  return fitCalibration({ graduations, toleranceUm: setup.toleranceUm });
}

function pointedAt(random: Random, x: number, y: number) {
  return px(x + random.normal(POINTING_SD_PX), y + random.normal(POINTING_SD_PX));
}

/** One body of this true length, lying anyhow, measured along. */
function body(random: Random, lengthUm: number, scale: Scale) {
  const angle = random.within(Math.PI);
  const half = lengthUm / TRUE_UM_PER_PX / 2;
  const a = pointedAt(random, 1000 - half * Math.cos(angle), 800 - half * Math.sin(angle));
  const b = pointedAt(random, 1000 + half * Math.cos(angle), 800 + half * Math.sin(angle));
  return { a, b, measure: measureNote({ type: 'line', a, b }, 'along', scale) };
}

/** Share of repeats in which the interval held the truth. */
function share(held: (random: Random, repeat: number) => boolean): number {
  const random = seeded(20260701);
  let count = 0;
  for (let repeat = 0; repeat < REPEATS; repeat++) if (held(random, repeat)) count++;
  return count / REPEATS;
}

function expectHonest(coverage: number): void {
  expect(coverage).toBeGreaterThanOrEqual(0.935);
  expect(coverage).toBeLessThanOrEqual(0.965);
}

describe('coverage of the stated 95 % intervals', () => {
  it.each<[string, Setup]>([
    ['eleven marks of an uncertificated slide', WHOLE],
    ['eleven marks of a perfect slide', { ...WHOLE, toleranceUm: 0 }],
    ['five marks, three degrees of freedom', { graduations: 5, spacingUm: 25, toleranceUm: 0, errs: true }],
    ['two marks', { graduations: 2, spacingUm: 1000, toleranceUm: 0, errs: true }],
    [
      'a short ruling, where the tolerance is nearly all',
      { graduations: 11, spacingUm: 10, toleranceUm: TOLERANCE_UM, errs: true },
    ],
  ])('of a calibration from %s', (_, setup) => {
    expectHonest(
      share((random) => {
        const { ci95 } = calibrate(random, setup);
        return ci95.low <= TRUE_UM_PER_PX && TRUE_UM_PER_PX <= ci95.high;
      }),
    );
  });

  it.each([8.4, 40, 430])('of one body of %d µm, quoted as U and as 95 % interval', (lengthUm) => {
    let quoted = 0;
    const coverage = share((random) => {
      const scale = calibrationScale([calibrate(random, WHOLE)]);
      const { a, b } = body(random, lengthUm, scale);
      const budget = lengthBudget({ lengthPx: { dx: b.x - a.x, dy: b.y - a.y }, scale, pointingPx: POINTING_PX });
      const error = Math.abs(budget.lengthUm - lengthUm);
      if (error <= budget.U) quoted++;
      return error <= budget.halfWidth95;
    });
    expectHonest(coverage);
    // k = 2 is 95.4 % of a normal error; it may be too wide where the tolerance counts, never too narrow
    expect(quoted / REPEATS).toBeGreaterThanOrEqual(0.935);
  });

  it.each<[string, number, number, number, Setup]>([
    ['thirty alike bodies', 30, 8.4, 0, WHOLE],
    ['five alike bodies', 5, 8.4, 0, WHOLE],
    ['three bodies that differ', 3, 8.4, 0.42, WHOLE],
    ['thirty bodies that differ', 30, 8.4, 0.42, WHOLE],
    ['thirty long ones, where the tolerance counts', 30, 86, 0, WHOLE],
    ['thirty by a short ruling, where it is all', 30, 40, 0, { ...WHOLE, spacingUm: 10 }],
  ])('of the mean of %s', (_, n, lengthUm, sdUm, setup) => {
    let quoted = 0;
    expectHonest(
      share((random) => {
        const scale = calibrationScale([calibrate(random, setup)]);
        const bodies = Array.from({ length: n }, () => body(random, lengthUm + random.normal(sdUm), scale).measure);
        const summary = summariseSeries(bodies, {
          quantity: 'length',
          relativeScale: scale.relativeUncertainty,
          limitFraction: scale.limitFraction,
        });
        if (summary && Math.abs(summary.mean - lengthUm) <= summary.U) quoted++;
        return summary !== null && summary.interval95.low <= lengthUm && lengthUm <= summary.interval95.high;
      }),
    );
    expect(quoted / REPEATS).toBeGreaterThanOrEqual(0.935);
  });

  it('of the mean of thirty when the slide happens to be perfect and nobody knows', () => {
    expectHonest(
      share((random) => {
        const scale = calibrationScale([calibrate(random, { ...WHOLE, errs: false })]);
        const bodies = Array.from({ length: 30 }, () => body(random, 8.4, scale).measure);
        const summary = summariseSeries(bodies, { quantity: 'length', relativeScale: scale.relativeUncertainty });
        return summary !== null && summary.interval95.low <= 8.4 && 8.4 <= summary.interval95.high;
      }),
    );
  });

  it('of the ratio Q of one body', () => {
    const coverage = share((random) => {
      const scale = calibrationScale([calibrate(random, WHOLE)]);
      const along = body(random, 8.4, scale);
      const across = body(random, 6, scale);
      const { q, qU } = measureNote({ type: 'cross', along, across }, 'along-then-across', scale);
      return Math.abs((q as number) - 1.4) <= (qU as number);
    });
    expectHonest(coverage);
  });

  it('would be missed by the scatter alone, without the scale', () => {
    // shows that these tests can fail: thirty long bodies by a short ruling
    const coverage = share((random) => {
      const scale = calibrationScale([calibrate(random, { ...WHOLE, spacingUm: 10 })]);
      const lengths = Array.from({ length: 30 }, () => body(random, 40, scale).measure.dimensions[0]?.um as number);
      const interval = meanInterval(summarise(lengths) as { mean: number; sd: number; n: number });
      return interval !== null && interval.low <= 40 && 40 <= interval.high;
    });
    expect(coverage).toBeLessThan(0.5);
  });
});

describe('mean of thirty', () => {
  it('lies within 1 % of the truth each time, with a new calibration each time', () => {
    const random = seeded(7);
    for (let repeat = 0; repeat < 500; repeat++) {
      const scale = calibrationScale([calibrate(random, WHOLE)]);
      // 45 px long: a spore of nearly 10 µm under a good dry lens
      const bodies = Array.from({ length: 30 }, () => body(random, 9.7, scale).measure.dimensions[0]?.um as number);
      expectClose(summarise(bodies)?.mean, 9.7, 0.01);
    }
  });
});

describe('half-width that holds 95 %', () => {
  it('is 1.96 of a spread, 0.95 of a limit, and between for both', () => {
    expectClose(halfWidth95({ normal: 1, limit: 0 }), 1.959963985, 1e-9);
    expectClose(halfWidth95({ normal: 0, limit: 1 }), 0.95, 1e-12);
    expectClose(halfWidth95({ normal: 1, limit: 0, degreesOfFreedom: 9 }), 2.262157163, 1e-9);
    expect(halfWidth95({ normal: 0, limit: 0 })).toBe(0);
  });

  it('agrees with drawing both parts', () => {
    const random = seeded(3);
    const half = halfWidth95({ normal: 0.5, limit: 1.2 });
    let within = 0;
    for (let i = 0; i < 200_000; i++) if (Math.abs(random.normal(0.5) + random.within(1.2)) <= half) within++;
    expectClose(within / 200_000, 0.95, 0.002);
  });

  it('does not jump where a limit becomes too small to matter', () => {
    expectClose(halfWidth95({ normal: 1, limit: 1.01e-4 }), halfWidth95({ normal: 1, limit: 0.99e-4 }), 1e-6);
  });

  it('refuses what is no uncertainty', () => {
    expect(codeOf(() => halfWidth95({ normal: -1, limit: 0 }))).toBe('not-positive');
    expect(codeOf(() => halfWidth95({ normal: NaN, limit: 0 }))).toBe('not-finite');
  });
});
