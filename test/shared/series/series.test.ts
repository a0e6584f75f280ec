import { describe, expect, it } from 'vitest';
import type { BodyMeasure } from '../../../shared/annotations/measure.js';
import { edgeUncertainty } from '../../../shared/scale/uncertainty.js';
import { summariseSeries, valuesOf } from '../../../shared/series/series.js';
import samples from '../../fixtures/samples.json' with { type: 'json' };
import { codeOf, expectClose } from '../../support/close.js';

function body(length: number | null, width: number | null): BodyMeasure {
  return {
    dimensions: [
      ...(length === null ? [] : [{ dimension: 'length' as const, px: length / 0.2, um: length, u: 0.15 }]),
      ...(width === null ? [] : [{ dimension: 'width' as const, px: width / 0.2, um: width, u: 0.15 }]),
    ],
    q: length !== null && width !== null ? length / width : null,
    qU: length !== null && width !== null ? 0.1 : null,
  };
}
const thirty = samples.spores.L.map((length, i) => body(length, samples.spores.W[i] as number));

describe('series of thirty', () => {
  it('adds scatter, scale and edge to the mean', () => {
    // √(0.0777² + (0.002·8.24)² + 0.106²), JCGM 100:2008 §5.1.2; 0.42556/√30 = 0.0777; two edges of 0.13/√3
    const summary = summariseSeries(thirty, {
      quantity: 'length',
      relativeScale: 0.002,
      edgeUm: edgeUncertainty(0.13),
    });
    expectClose(summary?.mean, 8.24, 1e-12);
    expectClose(summary?.sd, 0.42556, 1e-4);
    expectClose(summary?.parts.scatter, 0.0777, 1e-3);
    expectClose(summary?.parts.scale, 0.01648, 1e-9);
    expectClose(summary?.parts.edge, 0.106, 2e-3);
    expectClose(summary?.u, 0.13246, 1e-3);
    expectClose(summary?.U, 0.26492, 1e-3);
    expect(summary).toMatchObject({ n: 30, min: 7.2, max: 9.4, quantity: 'length' });
  });

  it('states k for its degrees of freedom', () => {
    const scatterOnly = summariseSeries(thirty, { quantity: 'length', relativeScale: 0 });
    expectClose(scatterOnly?.k95, 2.045, 1e-3); // t(0.975, 29), NIST/SEMATECH e-Handbook 1.3.6.7.2
    expectClose(scatterOnly?.degreesOfFreedom, 29, 1e-12);
    expectClose(scatterOnly?.scatterInterval?.low, scatterOnly?.interval95.low as number, 1e-9);
    const three = summariseSeries(thirty.slice(0, 3), { quantity: 'length', relativeScale: 0 });
    expectClose(three?.k95, 4.303, 1e-3); // t(0.975, 2)
    expectClose(three?.k, 4.303, 1e-3);
    expectClose(three?.U, 4.3026527 * (three?.u as number), 1e-6);
    expect(scatterOnly?.k).toBe(2);
  });

  it('does not let the scale shrink with the number of bodies', () => {
    const many = Array.from({ length: 40 }, () => thirty).flat();
    const summary = summariseSeries(many, { quantity: 'length', relativeScale: 0.01 });
    expectClose(summary?.parts.scale, 0.0824, 1e-9);
    expect(summary?.u).toBeGreaterThan(0.0824);
    expect(summary?.u).toBeLessThan(0.084);
    expectClose(summary?.k95, 1.96, 1e-3);
  });

  it('leaves the scale out of Q but not the edge', () => {
    const q = summariseSeries(thirty, { quantity: 'q', relativeScale: 0.2, edgeUm: 0.106 });
    expectClose(q?.mean, 1.400514, 1e-6); // the mean of ratios
    expect(q?.parts.scale).toBe(0);
    // 0.106·√(1 + 1.4005²)/5.88333: both edges independent, JCGM 100:2008 §5.1.6
    expectClose(q?.parts.edge, 0.03101, 1e-3);
  });

  it('can be of widths, or of ratios without any scale', () => {
    expectClose(summariseSeries(thirty, { quantity: 'width', relativeScale: 0 })?.mean, 5.88333, 1e-5);
    const unscaled: BodyMeasure = { dimensions: [{ dimension: 'length', px: 42, um: null, u: null }], q: 1.4, qU: 0.1 };
    expect(summariseSeries([unscaled], { quantity: 'length', relativeScale: 0 })).toBeNull();
    expect(summariseSeries([unscaled, unscaled], { quantity: 'q', relativeScale: 0 })?.mean).toBe(1.4);
  });

  it('passes over bodies whose width is not drawn yet', () => {
    expect(valuesOf([body(8, 6), body(9, null)], 'width')).toEqual([6]);
    expect(valuesOf([body(8, 4), body(9, null)], 'q')).toEqual([2]);
  });
});

describe('series of one and of none', () => {
  it('takes the pointing of its one body, for want of scatter', () => {
    // u 0.15 µm holds 1 % of 8 µm: √(0.15² − 0.08²) by pointing, and the scale comes back beside it
    const summary = summariseSeries([body(8, 6)], { quantity: 'length', relativeScale: 0.01 });
    expect(summary).toMatchObject({ n: 1, sd: null, scatterInterval: null, degreesOfFreedom: null });
    expectClose(summary?.u, 0.15, 1e-9);
    expectClose(summary?.k95, 1.96, 1e-4);
    expectClose(summariseSeries([body(8, 6)], { quantity: 'q', relativeScale: 0.01 })?.u, 0.05, 1e-9);
  });

  it('has no answer without bodies', () => {
    expect(summariseSeries([], { quantity: 'length', relativeScale: 0.01 })).toBeNull();
    expect(codeOf(() => summariseSeries(thirty, { quantity: 'length', relativeScale: NaN }))).toBe('not-finite');
    expect(codeOf(() => summariseSeries(thirty, { quantity: 'length', relativeScale: 0, edgeUm: -1 }))).toBe(
      'not-positive',
    );
  });
});
