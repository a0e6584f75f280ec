import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decimalsFor, roundDecimal } from '../../../shared/units/decimals.js';
import { quantityParts, quantityText, roundToUncertainty } from '../../../shared/scale/rounding.js';
import { codeOf } from '../../support/close.js';

/** Written with ordinary spaces here; the product's are no-break ones but for the one before the bracket. */
const plain = (text: string) => text.replaceAll('\u00A0', ' ');

describe('rounding to the uncertainty', () => {
  it.each([
    [10.1721, 0.152, '10.17 ± 0.15'],
    [10.05762, 0.027, '10.058 ± 0.027'], // JCGM 100:2008 §7.2.6
    [7.4512, 0.0951, '7.451 ± 0.095'],
    [0.215054, 0.000432, '0.21505 ± 0.00043'],
    [1234.5, 27.6, '1235 ± 28'], // halves go away from zero
    [28.05, 28.05, '28 ± 28'], // JCGM 100:2008 §7.2.6: 28.05 kHz goes down to 28 kHz
    [5, 0.0996, '5.00 ± 0.10'], // two digits after rounding, not 0.100
    [5, 0.0995, '5.00 ± 0.10'],
    [98765, 1234, '98800 ± 1200'],
    [-3.25, 1.04, '-3.3 ± 1.0'],
  ])('prints %d with %d as %s', (value, uncertainty, text) => {
    const rounded = roundToUncertainty(value, uncertainty);
    expect(`${rounded.value} ± ${rounded.uncertainty}`).toBe(text);
  });

  it('can keep one digit', () => {
    expect(roundToUncertainty(10.1721, 0.152, 1)).toEqual({ value: '10.2', uncertainty: '0.2' });
  });

  it.each([
    [1.005, 2, '1.01'],
    [2.675, 2, '2.68'],
    [1.45, 1, '1.5'],
    [0.5, 0, '1'],
    [-0.5, 0, '-1'],
    [-0.04, 1, '0.0'],
    [1e21, 0, '1000000000000000000000'],
    [1.5e-9, 10, '0.0000000015'],
    [149, -2, '100'],
    [150, -2, '200'],
  ])('rounds %d to %d places as it is written: %s', (value, decimals, text) => {
    expect(roundDecimal(value, decimals)).toBe(text);
  });

  it('rounds ends of a range outward', () => {
    expect(roundDecimal(6.24, 0, 'floor')).toBe('6');
    expect(roundDecimal(9.01, 0, 'ceil')).toBe('10');
    expect(roundDecimal(9, 0, 'ceil')).toBe('9');
    expect(roundDecimal(-6.24, 0, 'floor')).toBe('-7');
  });

  it('never moves a value by more than half a step, and keeps two digits of the uncertainty', () => {
    const value = fc.double({ min: -1e6, max: 1e6, noNaN: true });
    const uncertainty = fc.double({ min: 1e-6, max: 1e5, noNaN: true });
    fc.assert(
      fc.property(value, uncertainty, (v, u) => {
        const rounded = roundToUncertainty(v, u);
        const step = 10 ** -decimalsFor(u, 2);
        expect(Math.abs(Number(rounded.value) - v)).toBeLessThanOrEqual(step / 2 + 1e-9);
        expect(Math.abs(Number(rounded.uncertainty) - u)).toBeLessThanOrEqual(step / 2 + 1e-9);
        const digits = Number(rounded.uncertainty) / step;
        expect(Math.round(digits)).toBeGreaterThanOrEqual(10);
        expect(Math.round(digits)).toBeLessThanOrEqual(99);
      }),
    );
  });

  it('refuses no uncertainty', () => {
    expect(codeOf(() => roundToUncertainty(1, 0))).toBe('not-positive');
    expect(codeOf(() => roundToUncertainty(1, NaN))).toBe('not-positive');
    expect(codeOf(() => roundToUncertainty(NaN, 1))).toBe('not-finite');
  });
});

describe('a length as it is shown', () => {
  it('has its expanded uncertainty and a unit', () => {
    // 47.3 px (u 0.7) at 0.215054 µm/px (u 0.00043): U = 0.304 µm, k = 2
    expect(plain(quantityText(10.1720542, 0.1519056, 'calibrated'))).toBe('10.17 ± 0.30 µm');
    expect(plain(quantityText(12_340, 45, 'referenced'))).toBe('12.340 ± 0.090 mm');
    expect(quantityText(10.1720542, 0.1519056, 'calibrated')).toContain('0.30\u00A0µm');
  });

  it('has one digit and its range where a finger is the reference', () => {
    expect(plain(quantityText(8_000, 0.112 * 8_000, 'estimated'))).toBe('≈ 8 mm (6–10 mm)');
    expect(plain(quantityText(14, 0.112 * 14, 'estimated'))).toBe('≈ 10 µm (10–20 µm)');
    expect(plain(quantityText(1_100, 0.112 * 1_100, 'estimated'))).toBe('≈ 1 mm (0.8–2 mm)');
    expect(plain(quantityText(960, 0.112 * 960, 'estimated'))).toBe('≈ 1 mm (0.7–1.2 mm)');
  });

  it('has two digits where one finger was measured', () => {
    expect(plain(quantityText(8_430, 0.06 * 8_430, 'estimated'))).toBe('≈ 8.4 mm (7.4–9.5 mm)');
    expect(plain(quantityText(320, 0.05 * 320, 'estimated'))).toBe('≈ 320 µm (280–360 µm)');
  });

  it('hands its parts over for laying out', () => {
    expect(quantityParts(10.1720542, 0.1519056, 'calibrated')).toEqual({
      approx: false,
      value: '10.17',
      uncertainty: '0.30',
      unit: 'µm',
      low: '9.87',
      high: '10.48',
    });
    expect(quantityParts(8_000, 896, 'estimated')).toEqual({
      approx: true,
      value: '8',
      uncertainty: '2',
      unit: 'mm',
      low: '6',
      high: '10',
    });
  });

  it('survives nothing at all', () => {
    expect(plain(quantityText(0, 0.1, 'calibrated'))).toBe('0.00 ± 0.20 µm');
    expect(plain(quantityText(0, 0.1, 'estimated'))).toBe('≈ 0 µm (0–0.2 µm)');
    expect(plain(quantityText(5, 0, 'calibrated'))).toBe('5 ± 0 µm');
    expect(codeOf(() => quantityText(NaN, 1, 'calibrated'))).toBe('not-finite');
    expect(codeOf(() => quantityText(1, -1, 'estimated'))).toBe('not-positive');
  });

  it('always holds the value within its range, which holds value ± U', () => {
    const positive = fc.double({ min: 0.01, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(positive, fc.double({ min: 0.001, max: 0.6, noNaN: true }), (um, relative) => {
        const parts = quantityParts(um, relative * um, 'estimated');
        const factor = parts.unit === 'mm' ? 1000 : 1;
        const [low, value, high] = [parts.low, parts.value, parts.high].map((text) => Number(text) * factor) as [
          number,
          number,
          number,
        ];
        expect(low).toBeLessThanOrEqual(Math.max(0, um * (1 - 2 * relative)) + 1e-9 * um);
        expect(high).toBeGreaterThanOrEqual(um * (1 + 2 * relative) * (1 - 1e-9));
        expect(low).toBeLessThanOrEqual(value + 1e-9 * um);
        expect(high).toBeGreaterThanOrEqual(value - 1e-9 * um);
        expect(parts.value.replace(/^0\.0*|\.|0+$/g, '').length).toBeLessThanOrEqual(2);
      }),
    );
  });
});
