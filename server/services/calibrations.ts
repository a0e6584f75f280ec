import type { output } from 'zod/v4/core';
import type { Mark, NewCalibration } from '../../shared/contracts/rigs.js';
import {
  type CalibrationFit,
  calibrationScale,
  fitCalibration,
  graduationsFromIndexedMarks,
} from '../../shared/scale/calibration.js';
import type { Calibration } from '../db/calibrations.js';
import { type FieldError, Invalid } from '../problem.js';

/** What the fit alone says of a calibration: everything but whose, when and where. */
export type Fitted = Pick<
  Calibration,
  | 'umPerPxX'
  | 'umPerPxY'
  | 'relativeUncertainty'
  | 'fitRelative'
  | 'referenceRelative'
  | 'residualSdPx'
  | 'graduations'
  | 'spanUm'
>;

/**
 * Fits the marks anew: what a client reckoned is never taken over.
 *
 * Of two rulings, the span, the scatter and the two parts of the uncertainty are those of the less certain
 * one, which also decides the whole.
 *
 * @throws {DomainError} what `fitCalibration` and `calibrationScale` refuse
 */
export function fitMarks(input: Pick<NewCalibration, 'marks' | 'crossMarks' | 'spacingUm' | 'toleranceUm'>): Fitted {
  const fits = [input.marks, ...(input.crossMarks ? [input.crossMarks] : [])].map((marks) =>
    fitCalibration({
      graduations: graduationsFromIndexedMarks(marks, input.spacingUm),
      toleranceUm: input.toleranceUm,
    }),
  );
  const scale = calibrationScale(fits);
  const weaker = fits.reduce((a, b) => (b.relativeUncertainty > a.relativeUncertainty ? b : a)) as CalibrationFit;
  const referenceRelative = weaker.standardUncertaintyReference / weaker.umPerPx;
  return {
    umPerPxX: scale.umPerPxX,
    umPerPxY: scale.umPerPxY,
    relativeUncertainty: scale.relativeUncertainty,
    // with Student's widening for few marks, so that the two parts make up the whole
    fitRelative: Math.sqrt(Math.max(0, weaker.relativeUncertainty ** 2 - referenceRelative ** 2)),
    referenceRelative,
    residualSdPx: weaker.residualSdPx,
    graduations: fits.reduce((count, fit) => count + fit.count, 0),
    spanUm: weaker.spanUm,
  };
}

/** @throws {Invalid} beside each mark that lies outside the picture */
export function requireInside(
  input: Pick<NewCalibration, 'marks' | 'crossMarks'>,
  { width, height }: { width: number; height: number },
): void {
  const outside = (name: string, marks: readonly output<typeof Mark>[]): FieldError[] =>
    marks.flatMap(({ at }, i) =>
      at.x >= 0 && at.x <= width && at.y >= 0 && at.y <= height
        ? []
        : [
            {
              pointer: `#/${name}/${i}/at`,
              code: 'outside-the-picture',
              detail: `The picture has ${width} × ${height} px.`,
            },
          ],
    );
  const errors = [...outside('marks', input.marks), ...outside('crossMarks', input.crossMarks ?? [])];
  if (errors.length > 0) throw new Invalid(errors);
}
