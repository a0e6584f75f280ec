import { DomainError, requirePositive } from '../errors.js';

/* What lenses resolve and show. Wavelengths in nm (550 unless said), lengths in µm or mm as named. */

/** Green, where the eye sees best; nm. */
export const GREEN_NM = 550;

/**
 * Smallest distance of two points seen apart: 0.61·λ/NA, µm.
 * @see Inoué 1986, Video Microscopy, p. 114 (as tabulated by the University of Arizona)
 * @example rayleigh(0.65) // 0.516
 */
export function rayleigh(na: number, nm = GREEN_NM): number {
  positive({ na, nm });
  return (0.61 * nm) / 1000 / na;
}

/** Finest grating resolved: λ/(2·NA), µm; Abbe 1873. */
export function abbe(na: number, nm = GREEN_NM): number {
  positive({ na, nm });
  return nm / 1000 / (2 * na);
}

/** Pixels per resolved distance that a picture needs to keep it; Inoué 1986, as above. Never under 2. */
export const PIXELS_PER_RESOLVED = 2.3;

/** Largest pixel, at the specimen, that keeps what the objective resolves: R/2.3, µm. */
export function nyquistPixel(na: number, nm = GREEN_NM): number {
  return rayleigh(na, nm) / PIXELS_PER_RESOLVED;
}

/** The same on the sensor, µm. */
export function nyquistPixelOnSensor(na: number, magnification: number, nm = GREEN_NM): number {
  positive({ magnification });
  return nyquistPixel(na, nm) * magnification;
}

/** Are pixels larger than half the resolved distance, so that the camera loses what the objective shows? */
export function undersampled(umPerPx: number, na: number, nm = GREEN_NM): boolean {
  positive({ umPerPx });
  return umPerPx > rayleigh(na, nm) / 2;
}

/** Magnification that shows all and no emptiness: 500 to 1000 × NA; the lower bound from memory. */
export function usefulMagnification(na: number): { low: number; high: number } {
  positive({ na });
  return { low: 500 * na, high: 1000 * na };
}

/** Depth of field by waves alone: λ·n/NA² — the square matters —, µm. */
export function waveDepthOfField(na: number, nm = GREEN_NM, index = 1): number {
  positive({ na, nm, index });
  return ((nm / 1000) * index) / na ** 2;
}

/**
 * Depth of field as a camera sees it: λ·n/NA² + n·e/(M·NA), µm.
 * @param pixelUm smallest distance that the sensor resolves, µm on the sensor
 * @param index   of the medium before the lens: 1 air, 1.515 oil
 */
export function depthOfField(input: {
  readonly na: number;
  readonly magnification: number;
  readonly pixelUm: number;
  readonly index?: number;
  readonly nm?: number;
}): number {
  const { na, magnification, pixelUm, index = 1, nm = GREEN_NM } = input;
  positive({ magnification, pixelUm });
  return waveDepthOfField(na, nm, index) + (index * pixelUm) / (magnification * na);
}

/** Where a magnified picture is taken to be looked at from, mm: convention. */
const NEAR_POINT_MM = 250;

/**
 * A ball as a magnifier: f = n·D/(4(n − 1)), from the ball's middle.
 *
 * @param diameterMm of the ball; @param index of its glass, over 1
 * @returns focal length and working distance from the surface, mm; magnification 250 mm/f
 * @throws {DomainError} `not-positive`; `not-a-lens`
 * @example ballLens(1, 1.5168) // f 0.734 mm, 0.234 mm before the surface, 341×
 */
export function ballLens(
  diameterMm: number,
  index: number,
): { focalMm: number; backFocalMm: number; magnification: number } {
  positive({ diameterMm, index });
  if (!(index > 1)) throw new DomainError('not-a-lens', 'Glass has an index over 1.');
  const focalMm = (index * diameterMm) / (4 * (index - 1));
  return { focalMm, backFocalMm: focalMm - diameterMm / 2, magnification: NEAR_POINT_MM / focalMm };
}

/**
 * Thin lens: magnification f/(d − f) and distance of the image.
 * @param distanceMm from lens to subject, beyond the focal length
 * @throws {DomainError} `not-positive`; `no-image`
 */
export function thinLens(focalMm: number, distanceMm: number): { magnification: number; imageMm: number } {
  positive({ focalMm, distanceMm });
  if (!(distanceMm > focalMm)) throw new DomainError('no-image', 'Within its focal length a lens throws no image.');
  return { magnification: focalMm / (distanceMm - focalMm), imageMm: (focalMm * distanceMm) / (distanceMm - focalMm) };
}

/** f-number that counts for diffraction close up: N(1 + m), symmetric lens; from memory. */
export function effectiveF(fNumber: number, magnification: number): number {
  positive({ fNumber });
  if (!(magnification >= 0)) positive({ magnification });
  return fNumber * (1 + magnification);
}

/** Diameter of the Airy disc on the sensor: 2.44·λ·N, µm. */
export function airy(effectiveFNumber: number, nm = GREEN_NM): number {
  positive({ effectiveFNumber, nm });
  return (2.44 * nm * effectiveFNumber) / 1000;
}

/** Field of view: field number over the objective's magnification, mm. */
export function fieldOfView(fieldNumberMm: number, objective: number): number {
  positive({ fieldNumberMm, objective });
  return fieldNumberMm / objective;
}

function positive(values: Record<string, number>): void {
  for (const [name, value] of Object.entries(values)) requirePositive(value, name);
}

export { opticsScale, pixelAtSpecimen, pitchFromFocalPlane, pitchFromFilmEquivalent } from './optics-scale.js';
