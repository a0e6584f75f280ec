import { roundDecimal } from '../units/decimals.js';
import { precisionUncertaintyM } from './coordinate-precision.js';

/**
 * How far the public place is generalised: categories 4 (low) to 1 (extreme) of Chapman 2020, or not at all.
 */
export const SENSITIVITIES = ['none', 'low', 'medium', 'high', 'extreme'] as const;
export type Sensitivity = (typeof SENSITIVITIES)[number];

export interface Coordinates {
  /** degrees, WGS84; both or neither null */
  readonly latitude: number | null;
  readonly longitude: number | null;
  /** radius around the point that holds the true place, m; null: not known */
  readonly uncertaintyM: number | null;
}

/** Decimal places that are left in the public coordinates; null: no coordinates at all. */
const DECIMALS: Record<Exclude<Sensitivity, 'none'>, number | null> = {
  low: 3,
  medium: 2,
  high: 1,
  extreme: null,
};

const NOWHERE: Coordinates = { latitude: null, longitude: null, uncertaintyM: null };

/**
 * What everybody may see of a place.
 *
 * Rounded, never moved at random: random offsets average out over repeated finds of one spot. The
 * uncertainty is that of the rounded coordinates with the exact one on top, in whole metres rounded up. It
 * is computed at the *rounded* latitude, for from one at the exact latitude that latitude could be worked
 * out again.
 *
 * Where the exact uncertainty is not known, that of the rounding stands alone: it is twice what rounding
 * can do, which leaves as much again for what is not known. Of the extreme category no coordinates are
 * given (Chapman allows a region or 1° as well).
 *
 * @throws {DomainError} `not-a-latitude`
 * @see Chapman 2020, Current Best Practices for Generalizing Sensitive Species Occurrence Data, tables 6–7
 */
export function generalise(exact: Coordinates, sensitivity: Sensitivity): Coordinates {
  if (exact.latitude === null || exact.longitude === null) return NOWHERE;
  if (sensitivity === 'none') return exact;
  const decimals = DECIMALS[sensitivity];
  if (decimals === null) return NOWHERE;
  const latitude = Number(roundDecimal(exact.latitude, decimals));
  return {
    latitude,
    longitude: Number(roundDecimal(exact.longitude, decimals)),
    uncertaintyM: Math.ceil(precisionUncertaintyM(latitude, 10 ** -decimals) + (exact.uncertaintyM ?? 0)),
  };
}
