import { describe, expect, it } from 'vitest';
import { degreesFromRationals } from '../../../shared/units/degrees.js';
import { formatLength, MICROMETRES_PER, toMicrometres, unitFor } from '../../../shared/units/length.js';
import { codeOf, expectClose } from '../../support/close.js';

describe('lengths', () => {
  it('convert exactly', () => {
    expect(toMicrometres(2.5, 'mm')).toBe(2500);
    expect(toMicrometres(1, 'in')).toBe(25_400);
    expect(toMicrometres(3, 'nm')).toBe(0.003);
    expect(toMicrometres(1.2, 'cm')).toBe(12_000);
    expect(toMicrometres(1, 'm')).toBe(1_000_000);
    expect(MICROMETRES_PER.µm).toBe(1);
  });

  it('are written in µm below 1000 µm, then in mm, with a no-break space', () => {
    expect([999.9, 1000, -2000].map(unitFor)).toEqual(['µm', 'mm', 'mm']);
    expect(formatLength(8.25, 1)).toBe('8.3\u00A0µm');
    expect(formatLength(2500, 1)).toBe('2.5\u00A0mm');
  });

  it('refuse what is no number', () => {
    expect(codeOf(() => toMicrometres(NaN, 'mm'))).toBe('not-finite');
    expect(codeOf(() => formatLength(Infinity, 1))).toBe('not-finite');
  });
});

describe('degrees from Exif', () => {
  it('add minutes and seconds and take their sign from the letter', () => {
    expectClose(
      degreesFromRationals(
        [
          [51, 1],
          [30, 1],
          [2645, 100],
        ],
        'N',
      ),
      51.50734722,
      1e-9,
    );
    expectClose(
      degreesFromRationals(
        [
          [0, 1],
          [7, 1],
          [3999, 100],
        ],
        'W',
      ),
      -0.127775,
      1e-9,
    );
  });

  it('have no answer for 0/0 and refuse a place beyond the poles', () => {
    expect(
      degreesFromRationals(
        [
          [0, 0],
          [0, 0],
          [0, 0],
        ],
        'N',
      ),
    ).toBeNull();
    expect(
      codeOf(() =>
        degreesFromRationals(
          [
            [91, 1],
            [0, 1],
            [0, 1],
          ],
          'S',
        ),
      ),
    ).toBe('not-a-position');
    expect(
      degreesFromRationals(
        [
          [91, 1],
          [0, 1],
          [0, 1],
        ],
        'E',
      ),
    ).toBe(91);
  });
});
