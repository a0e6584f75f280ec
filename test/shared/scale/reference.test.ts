import { describe, expect, it } from 'vitest';
import { px } from '../../../shared/geometry/points.js';
import { fingerScale, UNKNOWN_FINGER } from '../../../shared/scale/finger.js';
import { KNOWN_OBJECTS, knownObject, rulerLimitMm } from '../../../shared/scale/known-objects.js';
import { heightOffsetError, referenceScale, tiltError } from '../../../shared/scale/reference.js';
import {
  pointInCrop,
  pointInRendition,
  scaleAfterCrop,
  scaleAfterResize,
  scaleOfRegion,
} from '../../../shared/scale/resize.js';
import type { Scale } from '../../../shared/scale/scale.js';
import { codeOf, expectClose } from '../../support/close.js';

describe('reference in the frame', () => {
  const tenMillimetres = { a: px(10, 20), b: px(310, 420), lengthUm: 10_000, toleranceUm: 0 };

  it('gives the same scale for x and y', () => {
    // 500 px
    expect(referenceScale(tenMillimetres)).toMatchObject({ umPerPxX: 20, umPerPxY: 20, grounds: 'referenced' });
  });

  it('is as sure as its two ends, its tolerance, its height and its tilt', () => {
    expectClose(referenceScale(tenMillimetres).relativeUncertainty, (Math.SQRT2 * 0.5) / 500, 1e-12);
    expectClose(
      referenceScale({ ...tenMillimetres, pointingPx: 0, toleranceUm: 500 }).relativeUncertainty,
      0.05 / Math.sqrt(3),
      1e-12,
    );
    const high = referenceScale({ ...tenMillimetres, pointingPx: 0, heightMm: 10, distanceMm: 300 });
    expectClose(high.relativeUncertainty, 1 / 30 / Math.sqrt(3), 1e-12);
    const tilted = referenceScale({ ...tenMillimetres, pointingPx: 0, tiltDegrees: 10 });
    expectClose(tilted.relativeUncertainty, 0.0151922 / Math.sqrt(3), 1e-5);
  });

  it('is misread when it lies nearer than the subject', () => {
    // −Δz/z by similar triangles
    expectClose(heightOffsetError(10, 300), -0.0333333, 1e-5);
    expectClose(heightOffsetError(10, 150), -0.0666667, 1e-5);
    expectClose(heightOffsetError(5, 100), -0.05, 1e-12);
    expectClose(heightOffsetError(1, 25), -0.04, 1e-12);
    expectClose(heightOffsetError(-10, 300), 0.0333333, 1e-5);
  });

  it.each([
    [5, -0.38],
    [10, -1.52],
    [15, -3.41],
    [20, -6.03],
    [30, -13.4],
  ])('leaning by %d° makes %d %%', (degrees, percent) => {
    expect((100 * tiltError(degrees)).toFixed(2)).toBe(percent.toFixed(2)); // cos θ − 1
  });

  it('refuses what says too little', () => {
    expect(codeOf(() => referenceScale({ ...tenMillimetres, b: px(13, 24) }))).toBe('reference-too-short');
    expect(codeOf(() => referenceScale({ ...tenMillimetres, b: px(NaN, 24) }))).toBe('reference-too-short');
    expect(codeOf(() => referenceScale({ ...tenMillimetres, lengthUm: 0 }))).toBe('not-positive');
    expect(codeOf(() => referenceScale({ ...tenMillimetres, heightMm: 3 }))).toBe('height-without-distance');
    expect(codeOf(() => heightOffsetError(300, 300))).toBe('reference-behind-lens');
    expect(codeOf(() => tiltError(91))).toBe('not-an-angle');
  });
});

describe('known objects', () => {
  it('have ids of their own, lengths and limits', () => {
    expect(new Set(KNOWN_OBJECTS.map((object) => object.id)).size).toBe(KNOWN_OBJECTS.length);
    for (const { lengthMm, toleranceMm } of KNOWN_OBJECTS) {
      expect(toleranceMm).toBeGreaterThan(0);
      if (lengthMm !== null) expect(lengthMm).toBeGreaterThan(10 * toleranceMm);
    }
  });

  it.each([
    ['euro-0.01', 16.25],
    ['euro-0.02', 18.75],
    ['euro-0.05', 21.25],
    ['euro-0.10', 19.75],
    ['euro-0.20', 22.25],
    ['euro-0.50', 24.25],
    ['euro-1', 23.25],
    ['euro-2', 25.75], // Council Regulation (EC) 975/98
    ['us-cent', 19.05],
    ['us-nickel', 21.21],
    ['us-dime', 17.91],
    ['us-quarter', 24.26], // United States Mint
    ['card-long', 85.6],
    ['card-short', 53.98], // ISO/IEC 7810
  ])('%s measures %d mm', (id, lengthMm) => {
    expect(knownObject(id)?.lengthMm).toBe(lengthMm);
  });

  it('know no others', () => expect(knownObject('thumb')).toBeNull());

  it('let a class II ruler err by half a millimetre within a metre', () => {
    // EU Directive 2014/32/EU, Annex X (from memory): ±(a + b·L), whole metres rounded up
    expectClose(rulerLimitMm('II', 30), 0.5, 1e-12);
    expectClose(rulerLimitMm('I', 30), 0.2, 1e-12);
    expectClose(rulerLimitMm('III', 1200), 1.4, 1e-12);
  });
});

describe('finger in the frame', () => {
  const across = { a: px(100, 100), b: px(100, 770) };

  it('of nobody known is 16.75 ± 1.63 mm: women and men mixed evenly', () => {
    expect(UNKNOWN_FINGER.meanMm).toBe(16.75);
    expectClose(UNKNOWN_FINGER.sdMm, 1.63, 3e-3);
    const scale = fingerScale({ ...across, own: null });
    expectClose(scale.umPerPxX, 25, 1e-12);
    expect(scale.grounds).toBe('estimated');
    // 9.8 % breadth, 3 % edges, 5 % perspective: U about 22 %
    expect(2 * scale.relativeUncertainty).toBeGreaterThan(0.22);
    expect(2 * scale.relativeUncertainty).toBeLessThan(0.23);
  });

  it("of one's own, measured to half a millimetre, is twice as good", () => {
    const scale = fingerScale({ ...across, own: { breadthMm: 17, measuredToMm: 0.5 } });
    // 1.7 %, 3 %, 5 % in quadrature: 6.1 %
    expectClose(scale.relativeUncertainty, 0.0607, 5e-3);
    expectClose(scale.umPerPxX, 17_000 / 670, 1e-12);
  });

  it('refuses a dot and a finger of no breadth', () => {
    expect(codeOf(() => fingerScale({ a: px(0, 0), b: px(3, 0), own: null }))).toBe('reference-too-short');
    expect(codeOf(() => fingerScale({ ...across, own: { breadthMm: 0, measuredToMm: 0.5 } }))).toBe('not-positive');
  });
});

describe('scale of a copy', () => {
  const scale: Scale = {
    umPerPxX: 0.2150537634,
    umPerPxY: 0.2150537634,
    relativeUncertainty: 0.002,
    grounds: 'calibrated',
  };

  it('follows by ratio when the whole picture was resized', () => {
    expectClose(scaleAfterResize(scale, 6000, 1500).umPerPxX, 0.8602150538, 1e-9);
    expectClose(scaleAfterResize({ ...scale, umPerPxX: 0.5 }, 4032, 1600).umPerPxX, 1.26, 1e-12);
    expect(scaleAfterResize(scale, 6000, 1500)).toMatchObject({ relativeUncertainty: 0.002, grounds: 'calibrated' });
  });

  it('follows x and y apart when rounding to pixels made them differ', () => {
    const copy = scaleAfterResize({ ...scale, umPerPxX: 1, umPerPxY: 1 }, 1001, 100, 667, 67);
    expectClose(copy.umPerPxX, 10.01, 1e-12);
    expectClose(copy.umPerPxY, 9.955223881, 1e-9);
  });

  it('stays when the picture was cropped; only the origin moves', () => {
    expect(scaleAfterCrop(scale)).toEqual(scale);
    expect(pointInCrop(px(130, 75), px(100, 50))).toEqual(px(30, 25));
  });

  it('follows from a region and the width it was sent at', () => {
    expectClose(scaleOfRegion(scale, 1024, 512).umPerPxX, 0.4301075268, 1e-9);
    expect(pointInRendition(px(3000, 1000), { width: 6000, height: 4000 }, { width: 1500, height: 1000 })).toEqual(
      px(750, 250),
    );
  });

  it('refuses a picture of no width', () => {
    expect(codeOf(() => scaleAfterResize(scale, 6000, 0))).toBe('not-positive');
    expect(codeOf(() => scaleOfRegion(scale, NaN, 5))).toBe('not-positive');
  });
});
