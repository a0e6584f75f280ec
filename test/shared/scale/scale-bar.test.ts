import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BAR_LOOK, barLabel, barLayout, chooseBar } from '../../../shared/scale/scale-bar.js';
import { codeOf, expectClose } from '../../support/close.js';

describe('scale bar', () => {
  // 1-2-5 series, at most a quarter of the field: common practice, no source; worked by hand
  it.each([
    [30, 5],
    [86, 20],
    [120, 20],
    [216, 50],
    [430, 100],
    [550, 100],
    [1000, 200],
    [1290, 200],
    [2400, 500],
    [5000, 1000],
    [23500, 5000],
  ])('of a field of %d µm is %d µm', (field, bar) => {
    expect(chooseBar(field)).toBe(bar);
  });

  it.each([
    [80, 20],
    [4, 1],
    [8, 2],
    [0.8, 0.2],
    [0.4, 0.1],
    [4000, 1000],
    [20_000_000, 5_000_000],
    [154 * (80 / 154), 20],
    [161 * (200 / 161), 50],
    [(3 * 0.1 * 4) / 3, 0.1],
    [79.9999, 10],
    [1.2e-3, 2e-4],
  ])('takes exactly a quarter: %d µm has %d µm', (field, bar) => {
    expect(chooseBar(field)).toBe(bar);
  });

  it('is between a tenth and a quarter of the field, and 1, 2 or 5', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e9, noNaN: true }), (field) => {
        const bar = chooseBar(field);
        expect(bar).toBeLessThanOrEqual((field / 4) * (1 + 1e-9));
        expect(bar).toBeGreaterThan(field / 10 - 1e-9 * field);
        expect(['1', '2', '5']).toContain(bar.toExponential().split('e')[0]);
      }),
    );
  });

  it('is labelled in µm, from 1000 on in mm, with ≈ for an estimate', () => {
    expect(barLabel(20, 'calibrated')).toBe('20\u00A0µm');
    expect(barLabel(0.2, 'calibrated')).toBe('0.2\u00A0µm');
    expect(barLabel(500, 'referenced')).toBe('500\u00A0µm');
    expect(barLabel(1000, 'referenced')).toBe('1\u00A0mm');
    expect(barLabel(5000, 'estimated')).toBe('≈\u00A05\u00A0mm');
    expect(codeOf(() => barLabel(5000, 'none'))).toBe('no-scale');
  });

  it('shows its grounds by its shape', () => {
    expect(new Set(Object.values(BAR_LOOK)).size).toBe(4);
    expect(BAR_LOOK).toEqual({
      calibrated: 'solid-with-ticks',
      referenced: 'open',
      estimated: 'dashed',
      none: 'words',
    });
  });

  it('is laid out to a fraction of a pixel', () => {
    const layout = barLayout({ imageWidthPx: 2000, umPerPx: 0.0645, grounds: 'calibrated' });
    // field 129 µm; 20/0.0645 = 310.08 px
    expect(layout).toMatchObject({ lengthUm: 20, label: '20\u00A0µm', look: 'solid-with-ticks' });
    expectClose(layout?.lengthPx, 310.0775194, 1e-9);
  });

  it('keeps its true length however large the picture is sent', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 8, noNaN: true }), (zoom) => {
        const sent = barLayout({ imageWidthPx: 6000 * zoom, umPerPx: 0.215 / zoom, grounds: 'referenced' });
        expect(sent?.lengthUm).toBe(200);
        expectClose((sent as { lengthPx: number }).lengthPx / (6000 * zoom), 200 / (6000 * 0.215), 1e-9);
      }),
    );
  });

  it('is words where there is no scale', () => {
    expect(barLayout({ imageWidthPx: 2000, umPerPx: null, grounds: 'none' })).toBeNull();
    expect(barLayout({ imageWidthPx: 2000, umPerPx: 0.2, grounds: 'none' })).toBeNull();
    expect(codeOf(() => barLayout({ imageWidthPx: 0, umPerPx: 0.2, grounds: 'calibrated' }))).toBe('not-positive');
    expect(codeOf(() => chooseBar(NaN))).toBe('not-positive');
  });
});
