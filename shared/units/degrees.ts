import { DomainError } from '../errors.js';

/** A rational as Exif stores it. */
export type Rational = readonly [numerator: number, denominator: number];

/**
 * Decimal degrees from Exif's three rationals.
 *
 * @param parts degrees, minutes, seconds
 * @param ref   N and E positive, S and W negative
 * @returns null when a denominator is 0, for no answer
 * @throws {DomainError} `not-a-position` beyond ±180°, ±90° for a latitude
 * @see Exif 3.0 (CIPA DC-008), GPSLatitude and GPSLongitude
 */
export function degreesFromRationals(
  parts: readonly [Rational, Rational, Rational],
  ref: 'N' | 'S' | 'E' | 'W',
): number | null {
  if (parts.some(([, denominator]) => denominator === 0)) return null;
  const [degrees, minutes, seconds] = parts.map(([n, d]) => n / d) as [number, number, number];
  const size = degrees + minutes / 60 + seconds / 3600;
  const most = ref === 'N' || ref === 'S' ? 90 : 180;
  if (!(size >= 0 && size <= most)) throw new DomainError('not-a-position', `${size}° ${ref} lies nowhere on Earth.`);
  return ref === 'S' || ref === 'W' ? -size : size;
}
