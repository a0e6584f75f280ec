import { describe, expect, it } from 'vitest';
import { notation } from '../../../shared/taxonomy/spore-notation.js';
import { lengthClass, shapeRange, shapeTerm } from '../../../shared/taxonomy/spore-shape.js';
import { quantile } from '../../../shared/statistics/quantiles.js';
import { summarise } from '../../../shared/statistics/summary.js';
import samples from '../../fixtures/samples.json' with { type: 'json' };
import { codeOf, expectClose } from '../../support/close.js';

const thirty = samples.spores.L.map((lengthUm, i) => ({ lengthUm, widthUm: samples.spores.W[i] as number }));
const set = { bodies: thirty, fruitBodies: 1, collections: 1 } as const;

describe('spore notation', () => {
  // form: Tulloss & Lindgren 2005, Mycotaxon 91:193–194; figures of the thirty computed with another library
  it('prints the set to a tenth', () => {
    expect(notation({ ...set, roundTo: 0.1 })).toBe(
      '[30/1/1] (7.2–)7.6–8.9(–9.4) × (5.2–)5.4–6.3(–6.6) µm, Q = 1.38–1.43(–1.45), Qm = 1.40',
    );
  });

  it('prints it to a half, where brackets that round alike go', () => {
    expect(notation({ ...set, roundTo: 0.5 })).toBe(
      '[30/1/1] (7–)7.5–9(–9.5) × (5–)5.5–6.5 µm, Q = 1.38–1.43(–1.45), Qm = 1.40',
    );
  });

  it('prints other percentiles by type 6', () => {
    expect(notation({ ...set, roundTo: 0.1, quantileType: 6 })).toBe(
      '[30/1/1] (7.2–)7.4–9.1(–9.4) × (5.2–)5.3–6.4(–6.6) µm, Q = 1.38–1.44(–1.45), Qm = 1.40',
    );
  });

  it('rests on these percentiles, means and spreads', () => {
    const { L, W } = samples.spores;
    const Q = L.map((length, i) => length / (W[i] as number));
    expect([0.05, 0.95].map((p) => quantile(L, p, 7)?.toFixed(3))).toEqual(['7.645', '8.855']);
    expect([0.05, 0.95].map((p) => quantile(W, p, 6)?.toFixed(3))).toEqual(['5.310', '6.435']);
    expect([0.05, 0.95].map((p) => quantile(Q, p, 7)?.toFixed(5))).toEqual(['1.37807', '1.43043']);
    expect([L, W, Q].map((values) => summarise(values)?.sd?.toFixed(5))).toEqual(['0.42556', '0.28778', '0.01888']);
    // the mean of ratios is not the ratio of means
    expectClose(summarise(Q)?.mean, 1.400514, 1e-6);
    expectClose(8.24 / (summarise(W)?.mean as number), 1.400567, 1e-6);
  });

  it('gives the range and the number alone under twenty', () => {
    expect(notation({ ...set, bodies: thirty.slice(0, 19), roundTo: 0.1 })).toBe(
      '[19/1/1] 7.6–9.4 × 5.4–6.6 µm (n = 19), Q = 1.38–1.45, Qm = 1.40',
    );
  });

  it('has one factor for spheres', () => {
    const bodies = [11, 12, 12.5, 13.5].map((lengthUm) => ({ lengthUm, widthUm: null }));
    expect(notation({ bodies, fruitBodies: 2, collections: 1, roundTo: 0.5 })).toBe('[4/2/1] 11–13.5 µm (n = 4)');
  });

  it('takes Q only from bodies that have both', () => {
    const bodies = [
      { lengthUm: 8, widthUm: 4 },
      { lengthUm: 12, widthUm: null },
    ];
    expect(notation({ bodies, fruitBodies: 1, collections: 1, roundTo: 0.1 })).toBe(
      '[2/1/1] 8.0–12.0 × 4.0 µm (n = 2), Q = 2.00, Qm = 2.00',
    );
  });

  it('has no answer for no spores and refuses sizes of nothing', () => {
    expect(notation({ ...set, bodies: [], roundTo: 0.1 })).toBeNull();
    expect(codeOf(() => notation({ ...set, bodies: [{ lengthUm: 0, widthUm: 3 }], roundTo: 0.1 }))).toBe(
      'not-positive',
    );
    expect(codeOf(() => notation({ ...set, bodies: [{ lengthUm: 5, widthUm: NaN }], roundTo: 0.1 }))).toBe(
      'not-positive',
    );
    expect(codeOf(() => notation({ ...set, fruitBodies: 1.5, roundTo: 0.1 }))).toBe('not-a-count');
  });
});

describe('spore shape', () => {
  // Bas 1969, Persoonia 5:285–579 (attribution from memory); a bound takes the lower class: common practice
  it.each([
    [1, 'globose'],
    [1.03, 'globose'],
    [1.05, 'globose'],
    [1.1, 'subglobose'],
    [1.15, 'subglobose'],
    [1.2, 'broadly ellipsoid'],
    [1.4, 'ellipsoid'],
    [1.6, 'ellipsoid'],
    [1.8, 'elongate'],
    [2.5, 'cylindrical'],
    [3, 'cylindrical'],
    [3.2, 'bacilliform'],
    [8.4 / 8, 'globose'],
    [6.6 / 6, 'subglobose'],
  ])('of Q %d is %s', (q, term) => expect(shapeTerm(q)).toBe(term));

  it('spans classes in words', () => {
    expect(shapeRange(1.378, 1.43)).toBe('ellipsoid');
    expect(shapeRange(1.1, 1.2)).toBe('subglobose to broadly ellipsoid');
    expect(codeOf(() => shapeRange(1.3, 1.2))).toBe('range-reversed');
  });

  it('is the same turned by a quarter', () => expect(shapeTerm(1 / 1.4)).toBe(shapeTerm(1.4)));
  it('of nothing is refused', () => expect(codeOf(() => shapeTerm(NaN))).toBe('not-positive'));

  it('has length classes', () => {
    // Watling 1973
    expect([5, 8, 12, 16].map(lengthClass)).toEqual(['small', 'medium', 'long', 'very long']);
  });
});
