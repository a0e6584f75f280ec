import { requirePositive } from '../errors.js';

/** One division of the usual stage micrometer, 1 mm in 100, µm. */
export const STAGE_DIVISION_UM = 10;

/**
 * What one division of an eyepiece graticule covers, for series that are typed in without a picture.
 *
 * Holds for one objective on one microscope: a ratio of nominal powers doesn't replace measuring it again.
 *
 * @param coincide where both rulings meet: so many stage divisions on so many of the eyepiece
 * @param stageDivisionUm µm, 10 unless said
 * @returns µm per eyepiece division
 * @throws {DomainError} `not-positive`
 * @see College of the Canyons, "Ocular and Stage Micrometers"
 * @example eyepieceValue({ stage: 12, eyepiece: 22 }) // 5.45
 */
export function eyepieceValue(
  coincide: { readonly stage: number; readonly eyepiece: number },
  stageDivisionUm = STAGE_DIVISION_UM,
): number {
  requirePositive(coincide.stage, 'stage');
  requirePositive(coincide.eyepiece, 'eyepiece');
  requirePositive(stageDivisionUm, 'stageDivisionUm');
  return (coincide.stage * stageDivisionUm) / coincide.eyepiece;
}
