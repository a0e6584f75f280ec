import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { generalise } from '../../../shared/place/generalise.js';

/** The worked place of the check: figures computed from the formula of Chapman & Wieczorek 2020 §3.4. */
const EXACT = { latitude: 51.50735, longitude: -0.12778, uncertaintyM: null };

describe('the public place', () => {
  it.each([
    ['high', 51.5, -0.1, 13115],
    ['medium', 51.51, -0.13, 1312],
    ['low', 51.507, -0.128, 132],
  ] as const)(
    'of %s sensitivity is rounded and says how far off it may be',
    (sensitivity, latitude, longitude, atLeast) => {
      const place = generalise(EXACT, sensitivity);
      expect(place).toMatchObject({ latitude, longitude });
      expect(place.uncertaintyM).toBeGreaterThanOrEqual(atLeast);
      expect(place.uncertaintyM).toBeLessThanOrEqual(atLeast + 1);
    },
  );

  it('of extreme sensitivity has no coordinates', () => {
    expect(generalise({ ...EXACT, uncertaintyM: 8 }, 'extreme')).toEqual({
      latitude: null,
      longitude: null,
      uncertaintyM: null,
    });
  });

  it('that is not sensitive is the exact one', () => {
    expect(generalise({ ...EXACT, uncertaintyM: 8 }, 'none')).toEqual({ ...EXACT, uncertaintyM: 8 });
  });

  it('adds the uncertainty of the exact place', () => {
    const without = generalise(EXACT, 'medium').uncertaintyM as number;
    expect(generalise({ ...EXACT, uncertaintyM: 250 }, 'medium').uncertaintyM).toBe(without + 250);
  });

  it('does not tell the exact latitude through its uncertainty', () => {
    const one = generalise({ ...EXACT, latitude: 51.46 }, 'high');
    const other = generalise({ ...EXACT, latitude: 51.54 }, 'high');
    expect(one.uncertaintyM).toBe(other.uncertaintyM);
  });

  it('is nowhere without coordinates', () => {
    expect(generalise({ latitude: null, longitude: null, uncertaintyM: 5 }, 'low').uncertaintyM).toBeNull();
  });

  it('never writes minus zero', () => {
    expect(Object.is(generalise({ latitude: -0.01, longitude: -0.02, uncertaintyM: null }, 'high').latitude, 0)).toBe(
      true,
    );
  });

  it('always holds the true place, wherever that is', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: -180, max: 180, noNaN: true }),
        fc.constantFrom('low' as const, 'medium' as const, 'high' as const),
        (latitude, longitude, sensitivity) => {
          const place = generalise({ latitude, longitude, uncertaintyM: null }, sensitivity);
          expect(roughDistanceM(latitude, longitude, place.latitude as number, place.longitude as number)).toBeLessThan(
            place.uncertaintyM as number,
          );
        },
      ),
    );
  });
});

/** On a sphere of the ellipsoid's mean radius: within 0.6 %, and the figure above has a margin of two. */
function roughDistanceM(latA: number, lonA: number, latB: number, lonB: number): number {
  const rad = Math.PI / 180;
  const north = (latB - latA) * rad;
  const east = (lonB - lonA) * rad * Math.cos(((latA + latB) / 2) * rad);
  return 6371009 * Math.hypot(north, east);
}
