import { DomainError } from '@shared/errors';
import {
  calibrationScale,
  fitCalibration,
  graduationsFromIndexedMarks,
  type CalibrationFit,
} from '@shared/scale/calibration';
import type { CalibrationView, Mark } from '@shared/contracts/rigs';
import type { Scale } from '@shared/scale/scale';

/** What the marks say so far. */
export type Look =
  | { readonly state: 'too-few' }
  | { readonly state: 'problem'; readonly code: string; readonly parameters: Readonly<Record<string, string | number>> }
  | {
      readonly state: 'fit';
      readonly scale: Scale;
      readonly fit: CalibrationFit;
      /** of the ruling across, where there is one */
      readonly cross: CalibrationFit | null;
      /** standard uncertainties as fractions, of the ruling along: from the marks, and from the micrometer */
      readonly fromMarks: number;
      readonly fromMicrometer: number;
      /** how much of the picture, in the ruling's direction, lies between the outermost marks; 0 to 1 */
      readonly spanShare: number;
    };

export interface Looked {
  readonly marks: readonly Mark[];
  readonly crossMarks: readonly Mark[];
  readonly spacingUm: number;
  readonly toleranceUm: number;
  /** upright pixels */
  readonly width: number;
  readonly height: number;
}

/** The live fit, by the same code that the server keeps it with. A second ruling counts from two marks on. */
export function look(looked: Looked): Look {
  const { marks, crossMarks, spacingUm, toleranceUm, width, height } = looked;
  if (marks.length < 2) return { state: 'too-few' };
  try {
    const fitOf = (of: readonly Mark[]) =>
      fitCalibration({ graduations: graduationsFromIndexedMarks(of, spacingUm), toleranceUm });
    const fit = fitOf(marks);
    const cross = crossMarks.length >= 2 ? fitOf(crossMarks) : null;
    const fromMicrometer = fit.standardUncertaintyReference / fit.umPerPx;
    return {
      state: 'fit',
      scale: calibrationScale(cross ? [fit, cross] : [fit]),
      fit,
      cross,
      fromMarks: Math.sqrt(Math.max(0, fit.relativeUncertainty ** 2 - fromMicrometer ** 2)),
      fromMicrometer,
      spanShare: Math.min(1, fit.spanPx / throughThePicture(fit.direction, width, height)),
    };
  } catch (error) {
    // Marks on one spot, numbers used twice, a nonsensical spacing: said beside the picture until mended.
    if (!(error instanceof DomainError)) throw error;
    return { state: 'problem', code: error.code, parameters: error.parameters };
  }
}

/** Length of a line through the picture's middle in a direction, image px. */
function throughThePicture(direction: number, width: number, height: number): number {
  return Math.min(width / Math.abs(Math.cos(direction)), height / Math.abs(Math.sin(direction)));
}

/** Under so much of the picture a longer span is advised; a starting value of our own. */
export const LONG_ENOUGH = 0.6;

/** From so many marks on their own scatter counts; `fitCalibration` says why. */
export const ENOUGH_MARKS = 5;

/**
 * By what fraction a new scale departs from the last one of its setting, when that is more than both
 * uncertainties allow (k = 2); else null.
 */
export function departure(scale: Scale, last: CalibrationView): number | null {
  const by = scale.umPerPxX / last.umPerPxX - 1;
  return Math.abs(by) > 2 * Math.hypot(scale.relativeUncertainty, last.relativeUncertainty) ? by : null;
}
