import { DomainError } from '../errors.js';

/* The WGS84 ellipsoid: semi-major axis, m, and first eccentricity squared (from memory, NIMA TR8350.2). */
const SEMI_MAJOR_M = 6378137;
const FLATTENING = 1 / 298.257223563;
const ECCENTRICITY_SQUARED = FLATTENING * (2 - FLATTENING);

/**
 * How far a place may lie from coordinates that are written to a given precision, m.
 *
 * The diagonal of the cell that one step of the precision spans in both directions, on WGS84. That is twice
 * the largest error of plain rounding, so it also holds where the digits were cut off instead of rounded.
 *
 * @param latitude  degrees, −90 to 90
 * @param precision one step of the last digit, degrees, positive: 0.01, or 1/60 for whole minutes
 * @throws {DomainError} `not-a-latitude`; `not-positive`
 * @see Chapman & Wieczorek 2020, Georeferencing Best Practices, §3.4 (formula and table)
 * @example precisionUncertaintyM(10.27, 0.01) // 1556.8
 */
export function precisionUncertaintyM(latitude: number, precision: number): number {
  if (!(Math.abs(latitude) <= 90)) throw new DomainError('not-a-latitude', `Latitude was ${latitude}.`);
  if (!(precision > 0 && Number.isFinite(precision))) {
    throw new DomainError('not-positive', `The precision must be positive, was ${precision}.`, { name: 'precision' });
  }
  const phi = radians(latitude);
  const w2 = 1 - ECCENTRICITY_SQUARED * Math.sin(phi) ** 2;
  const meridional = (SEMI_MAJOR_M * (1 - ECCENTRICITY_SQUARED)) / w2 ** 1.5;
  const primeVertical = SEMI_MAJOR_M / Math.sqrt(w2);
  return Math.hypot(radians(precision) * meridional, radians(precision) * primeVertical * Math.cos(phi));
}

function radians(degrees: number): number {
  return (degrees * Math.PI) / 180;
}
