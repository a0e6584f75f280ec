import { describe, expect, it } from 'vitest';
import {
  abbe,
  airy,
  ballLens,
  depthOfField,
  effectiveF,
  fieldOfView,
  nyquistPixel,
  nyquistPixelOnSensor,
  opticsScale,
  pitchFromFilmEquivalent,
  pitchFromFocalPlane,
  pixelAtSpecimen,
  rayleigh,
  thinLens,
  undersampled,
  usefulMagnification,
  waveDepthOfField,
} from '../../../shared/scale/optics.js';
import {
  cropFactor,
  pitchAfterDigitalZoom,
  sensorWidthMm,
  OPTICS_RELATIVE_UNCERTAINTY,
} from '../../../shared/scale/optics-scale.js';
import { codeOf, expectClose } from '../../support/close.js';

describe('what an objective resolves', () => {
  it.each([
    [0.13, 2.42, 1.05],
    [0.45, 0.7, 0.3],
    [0.75, 0.42, 0.18],
    [1.3, 0.24, 0.11],
    [1.4, 0.22, 0.1],
  ])('at NA %d and 515 nm is %d µm, kept by pixels of %d µm', (na, resolved, pixel) => {
    // University of Arizona, after Inoué 1986, Video Microscopy, p. 114
    expect(Math.abs(rayleigh(na, 515) - resolved)).toBeLessThanOrEqual(0.005);
    expect(Math.abs(nyquistPixel(na, 515) - pixel)).toBeLessThanOrEqual(0.0051);
  });

  it.each([
    [4, 0.1, 3.355, 2.75, 1.459, 5.83],
    [10, 0.25, 1.342, 1.1, 0.583, 5.83],
    [20, 0.4, 0.839, 0.688, 0.365, 7.29],
    [40, 0.65, 0.516, 0.423, 0.224, 8.98],
    [60, 0.85, 0.395, 0.324, 0.172, 10.3],
    [100, 1.25, 0.268, 0.22, 0.117, 11.67],
    [100, 1.4, 0.24, 0.196, 0.104, 10.42],
  ])('of %d×/%d in green', (power, na, byRayleigh, byAbbe, pixel, onSensor) => {
    // 0.61·λ/NA, λ/(2·NA), R/2.3; worked with λ = 550 nm
    expect(Math.abs(rayleigh(na) - byRayleigh)).toBeLessThanOrEqual(0.00051);
    expect(Math.abs(abbe(na) - byAbbe)).toBeLessThanOrEqual(0.00051);
    expect(Math.abs(nyquistPixel(na) - pixel)).toBeLessThanOrEqual(0.00051);
    expect(Math.abs(nyquistPixelOnSensor(na, power) - onSensor)).toBeLessThanOrEqual(0.0051);
  });

  it('is 3.05 µm at NA 0.10 and 500 nm', () => expectClose(rayleigh(0.1, 500), 3.05, 1e-9));

  it('is lost by pixels larger than half of it', () => {
    // R/2 = 0.258 µm for NA 0.65
    expect(undersampled(0.25, 0.65)).toBe(false);
    expect(undersampled(0.27, 0.65)).toBe(true);
  });

  it('is shown in full by 325 to 650 times at NA 0.65', () => {
    expect(usefulMagnification(0.65)).toEqual({ low: 325, high: 650 });
  });
});

describe('depth of field', () => {
  it.each([
    [0.1, 55],
    [0.14, 28.1],
    [0.2, 13.8],
    [0.25, 8.8],
    [0.28, 7.02],
    [0.4, 3.44],
    [0.5, 2.2],
    [0.65, 1.3],
    [0.75, 0.98],
  ])('by waves at NA %d is %d µm', (na, depth) => {
    // λ·n/NA² at 550 nm in air: common practice, no source
    expect(Math.abs(waveDepthOfField(na) - depth)).toBeLessThanOrEqual(0.0501);
  });

  it.each([
    [4, 0.1, 1, 71.25],
    [10, 0.25, 1, 11.4],
    [20, 0.4, 1, 4.25],
    [40, 0.65, 1, 1.552],
    [100, 1.25, 1.515, 0.612],
  ])('with the camera of 6.5 µm pixels at %d×/%d in index %d is %d µm', (magnification, na, index, depth) => {
    expectClose(depthOfField({ na, magnification, index, pixelUm: 6.5 }), depth, 1e-3);
  });
});

describe('simple lenses', () => {
  it.each([
    [1.47, 5, 3.9096],
    [1.5, 10, 7.5],
    [1.5168, 1, 0.7337],
    [1.5168, 2.4, 1.761],
    [1.5168, 3, 2.2012],
    [1.77, 1, 0.5747],
    [1.458, 0.5, 0.3979],
  ])('a ball of index %d and %d mm has a focal length of %d mm', (index, diameter, focal) => {
    // f = nD/(4(n − 1)), paraxial; worked by hand
    expectClose(ballLens(diameter, index).focalMm, focal, 2e-4);
  });

  it('a ball of one millimetre magnifies 341 times and all but touches', () => {
    const lens = ballLens(1, 1.5168);
    expectClose(lens.magnification, 340.7, 1e-3);
    expectClose(lens.backFocalMm, 0.2337, 1e-3);
    expect(ballLens(10, 1.5).backFocalMm).toBe(2.5);
  });

  it.each([
    [100, 300, 0.5, 150],
    [100, 200, 1, 200],
    [60, 180, 0.5, 90],
    [50, 1000, 0.0526316, 52.6316],
  ])('a thin one of %d mm at %d mm magnifies %d times', (focal, distance, magnification, image) => {
    expectClose(thinLens(focal, distance).magnification, magnification, 1e-6);
    expectClose(thinLens(focal, distance).imageMm, image, 1e-6);
  });

  it('lose light and sharpness close up', () => {
    expect(effectiveF(8, 1)).toBe(16);
    expect(effectiveF(8, 4)).toBe(40);
    expectClose(airy(16), 21.47, 1e-3);
    expect(fieldOfView(22, 40)).toBe(0.55);
  });

  it('refuse what makes no image', () => {
    expect(codeOf(() => thinLens(50, 50))).toBe('no-image');
    expect(codeOf(() => ballLens(1, 1))).toBe('not-a-lens');
    expect(codeOf(() => rayleigh(0))).toBe('not-positive');
    expect(codeOf(() => effectiveF(8, NaN))).toBe('not-positive');
  });
});

describe('scale by calculation', () => {
  it.each([
    [6.45, 1, 100, 1, 0.0645],
    [3.45, 1, 40, 0.5, 0.1725],
    [3.45, 2, 40, 0.5, 0.345],
  ])(
    'pixels of %d µm, binned %d, at %d× and relay %d cover %d µm',
    (pixelPitchUm, binning, magnification, relay, covered) => {
      expectClose(pixelAtSpecimen({ pixelPitchUm, binning, magnification, relay }), covered, 1e-12);
    },
  );

  it('puts 77.519 pixels into 5 µm', () => {
    expectClose(5 / pixelAtSpecimen({ pixelPitchUm: 6.45, binning: 1, magnification: 100, relay: 1 }), 77.519, 1e-5);
  });

  it('is an estimate of at least 5 %', () => {
    const optics = { pixelPitchUm: 3.45, binning: 1, magnification: 40, relay: 0.5 };
    expect(opticsScale(optics)).toMatchObject({ grounds: 'estimated', relativeUncertainty: 0.06 });
    expect(opticsScale({ ...optics, relativeUncertainty: 0.01 }).relativeUncertainty).toBe(0.06);
    expect(opticsScale({ ...optics, relativeUncertainty: 0.1 }).relativeUncertainty).toBe(0.1);
    expect(codeOf(() => opticsScale({ ...optics, magnification: 0 }))).toBe('not-positive');
  });
});

describe('nominal powers', () => {
  it('miss a measured field by no more than a calculated scale allows', () => {
    // 267 µm from the powers engraved on the parts, 241 µm by a stage micrometer; common practice, no source
    const miss = 267 / 241 - 1;
    expect(miss).toBeCloseTo(0.108, 3);
    expect(2 * OPTICS_RELATIVE_UNCERTAINTY).toBeGreaterThan(miss);
  });
});

describe('sensor from metadata', () => {
  it.each([
    [3954.23, 3456, 6.423501, 22.1996],
    [3849.21, 5616, 6.598757, 37.0586], // the true sensor is 36 mm: 2.9 % less
  ])('of %d pixels per inch and %d pixels', (resolution, width, pitch, sensor) => {
    // tags as two camera bodies write them
    expectClose(pitchFromFocalPlane(resolution), pitch, 1e-6);
    expectClose(sensorWidthMm(pitchFromFocalPlane(resolution, 2) as number, width), sensor, 1e-5);
  });

  it('has a crop factor by its diagonal', () => {
    const pitch = pitchFromFocalPlane(3958.76) as number;
    expectClose(sensorWidthMm(pitch, 2304), 14.7828, 1e-5);
    // a diagonal of 26.6712 mm: 43.2666/26.6712
    expectClose(cropFactor({ width: 22.2, height: Math.sqrt(26.6712 ** 2 - 22.2 ** 2) }), 1.6222, 1e-4);
  });

  it('reads centimetres, millimetres and µm too, and no unknown unit', () => {
    expect(pitchFromFocalPlane(2000, 3)).toBe(5);
    expect(pitchFromFocalPlane(200, 4)).toBe(5);
    expect(pitchFromFocalPlane(0.2, 5)).toBe(5);
    expect(pitchFromFocalPlane(2000, 1)).toBeNull();
  });

  it('follows from the equivalent on film', () => {
    const sensor = pitchFromFilmEquivalent(4.3, 26, 4000, 3000);
    expectClose(sensor?.diagonalMm, 7.1556, 1e-5);
    expectClose(sensor?.widthMm, 5.7245, 1e-5);
    expectClose(sensor?.pitchUm, 1.43113, 1e-5);
    expect(pitchFromFilmEquivalent(4.3, 0, 4000, 3000)).toBeNull(); // 0 is unknown, Exif 3.0
  });

  it('spreads its pixels by digital zoom', () => {
    expect(pitchAfterDigitalZoom(1.4, 2)).toBe(0.7);
    expect(pitchAfterDigitalZoom(1.4, 0)).toBe(1.4);
    expect(codeOf(() => pitchAfterDigitalZoom(1.4, 0.5))).toBe('not-a-zoom');
  });
});
