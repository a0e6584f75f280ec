import { DomainError, requirePositive } from '../errors.js';
import { MICROMETRES_PER } from '../units/length.js';
import type { Scale } from './scale.js';

/**
 * Least relative standard uncertainty of a scale that was only calculated. One camera's focal-plane tag
 * gave its sensor 2.9 % too wide, and nominal powers missed a measured field by 10.8 %: 6 %, so that
 * U = 12 % holds both. Common practice, no source.
 */
export const OPTICS_RELATIVE_UNCERTAINTY = 0.06;

/**
 * What one pixel covers at the specimen: pitch·binning/(M·relay), µm.
 * @param relay magnification of the adapter, 1 for none
 * @throws {DomainError} `not-positive`
 * @example pixelAtSpecimen({ pixelPitchUm: 3.45, binning: 1, magnification: 40, relay: 0.5 }) // 0.1725
 */
export function pixelAtSpecimen(optics: {
  readonly pixelPitchUm: number;
  readonly binning: number;
  readonly magnification: number;
  readonly relay: number;
}): number {
  for (const [name, value] of Object.entries(optics)) requirePositive(value, name);
  return (optics.pixelPitchUm * optics.binning) / (optics.magnification * optics.relay);
}

/**
 * Scale by calculation alone; nominal powers don't replace a calibration.
 * @param relativeUncertainty k = 1, if more is doubted than the least; a smaller one is not believed
 * @returns grounds `estimated`
 * @throws {DomainError} `not-positive`
 */
export function opticsScale(optics: {
  readonly pixelPitchUm: number;
  readonly binning: number;
  readonly magnification: number;
  readonly relay: number;
  readonly relativeUncertainty?: number;
}): Scale {
  const { relativeUncertainty = 0, ...lenses } = optics;
  const umPerPx = pixelAtSpecimen(lenses);
  return {
    umPerPxX: umPerPx,
    umPerPxY: umPerPx,
    relativeUncertainty: Math.max(OPTICS_RELATIVE_UNCERTAINTY, relativeUncertainty),
    grounds: 'estimated',
  };
}

/**
 * FocalPlaneResolutionUnit: 2 inch and 3 cm as Exif 3.0 (CIPA DC-008) states; 4 mm and 5 µm are met
 * in the wild, and a missing unit means inch (both from memory).
 */
const FOCAL_PLANE_UNIT_UM: Record<number, number> = {
  2: MICROMETRES_PER.in,
  3: MICROMETRES_PER.cm,
  4: MICROMETRES_PER.mm,
  5: MICROMETRES_PER.µm,
};

/**
 * Distance of neighbouring pixels on the sensor, from FocalPlaneXResolution. Never from XResolution,
 * which is for printing.
 *
 * @param resolution pixels per unit
 * @param unit       FocalPlaneResolutionUnit
 * @returns µm; null for a unit that isn't known
 * @throws {DomainError} `not-positive`
 * @example pitchFromFocalPlane(3954.23, 2) // 6.4235
 */
export function pitchFromFocalPlane(resolution: number, unit = 2): number | null {
  requirePositive(resolution, 'resolution');
  const unitUm = FOCAL_PLANE_UNIT_UM[unit];
  return unitUm === undefined ? null : unitUm / resolution;
}

/** Width of a sensor of so many pixels, mm. */
export function sensorWidthMm(pitchUm: number, widthPx: number): number {
  requirePositive(pitchUm, 'pitchUm');
  requirePositive(widthPx, 'widthPx');
  return (pitchUm * widthPx) / 1000;
}

/** Diagonal of 36 × 24 mm film. */
export const FILM_DIAGONAL_MM = Math.hypot(36, 24);

/** How many times a sensor's diagonal goes into that of film. */
export function cropFactor(sensorMm: { readonly width: number; readonly height: number }): number {
  requirePositive(sensorMm.width, 'width');
  requirePositive(sensorMm.height, 'height');
  return FILM_DIAGONAL_MM / Math.hypot(sensorMm.width, sensorMm.height);
}

/**
 * Pitch by the diagonal, from FocalLength and FocalLengthIn35mmFilm.
 *
 * @param focalMm    real focal length, mm
 * @param film35Mm   equivalent for 36 × 24 mm film, mm; 0 means unknown (Exif 3.0)
 * @param widthPx and heightPx: of the whole frame
 * @returns µm, with the diagonal and width of the sensor in mm; null when the equivalent is unknown
 * @throws {DomainError} `not-positive`
 */
export function pitchFromFilmEquivalent(
  focalMm: number,
  film35Mm: number,
  widthPx: number,
  heightPx: number,
): { pitchUm: number; diagonalMm: number; widthMm: number } | null {
  for (const [name, value] of Object.entries({ focalMm, widthPx, heightPx })) requirePositive(value, name);
  if (film35Mm === 0) return null;
  requirePositive(film35Mm, 'film35Mm');
  const diagonalMm = (FILM_DIAGONAL_MM * focalMm) / film35Mm;
  const pitchUm = (diagonalMm / Math.hypot(widthPx, heightPx)) * 1000;
  return { pitchUm, diagonalMm, widthMm: (pitchUm * widthPx) / 1000 };
}

/**
 * Pitch after digital zoom: the pixels were spread over a smaller part of the sensor.
 * @param ratio DigitalZoomRatio; 0 means that none was used (Exif 3.0)
 * @throws {DomainError} `not-a-zoom` under 1
 */
export function pitchAfterDigitalZoom(pitchUm: number, ratio: number): number {
  requirePositive(pitchUm, 'pitchUm');
  if (ratio === 0) return pitchUm;
  if (!(ratio >= 1 && Number.isFinite(ratio))) throw new DomainError('not-a-zoom', `Must be 1 or more, was ${ratio}.`);
  return pitchUm / ratio;
}
