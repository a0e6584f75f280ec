import type { CalibrationView } from '@shared/contracts/rigs';
import { roundToUncertainty } from '@shared/scale/rounding';
import { NO_BREAK_SPACE } from '@shared/units/length';

type Figures = Pick<CalibrationView, 'umPerPxX' | 'umPerPxY' | 'relativeUncertainty'>;

/** Axes that agree so well are one figure. */
const SAME = 1e-6;

/** `0.21505 ± 0.00034 µm/px`, U with k = 2; with both axes where pixels are not square. */
export function scaleWords(figures: Figures): string {
  const x = axisWords(figures.umPerPxX, figures.relativeUncertainty);
  if (Math.abs(figures.umPerPxX / figures.umPerPxY - 1) < SAME) return `${x}${NO_BREAK_SPACE}µm/px`;
  return `x ${x}, y ${axisWords(figures.umPerPxY, figures.relativeUncertainty)}${NO_BREAK_SPACE}µm/px`;
}

function axisWords(umPerPx: number, relative: number): string {
  if (!(relative > 0)) return String(umPerPx);
  const { value, uncertainty } = roundToUncertainty(umPerPx, 2 * umPerPx * relative);
  return `${value} ± ${uncertainty}`.replaceAll(' ', NO_BREAK_SPACE);
}

/** `0.16 %` of a standard uncertainty as a fraction, expanded (k = 2), to two digits. */
export function percentWords(relative: number): string {
  const percent = 200 * relative;
  return `${percent === 0 ? '0' : Number(percent.toPrecision(2))}${NO_BREAK_SPACE}%`;
}
