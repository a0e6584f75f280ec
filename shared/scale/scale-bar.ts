import { DomainError, requirePositive } from '../errors.js';
import { NO_BREAK_SPACE, unitFor, MICROMETRES_PER } from '../units/length.js';
import type { Grounds } from './scale.js';

export type BarLook = 'solid-with-ticks' | 'open' | 'dashed' | 'words';

/** A bar tells its grounds by its shape, without a legend and without colour. */
export const BAR_LOOK: Record<Grounds, BarLook> = {
  calibrated: 'solid-with-ticks',
  referenced: 'open',
  estimated: 'dashed',
  none: 'words',
};

/** A bar is at most this share of the picture's width; common practice, no source. */
export const LARGEST_SHARE = 1 / 4;

/**
 * The length of the bar for a picture: the largest of 1, 2, 5 × 10ⁿ that is at most a quarter of its width.
 *
 * @param fieldWidthUm what the picture's width covers, µm, positive
 * @returns µm
 * @throws {DomainError} `not-positive`
 * @example chooseBar(86) // 20
 */
export function chooseBar(fieldWidthUm: number): number {
  requirePositive(fieldWidthUm, 'fieldWidthUm');
  // 4000 px × 0.02 µm may come out a hair under 80: such dust must not cost a step
  const most = fieldWidthUm * LARGEST_SHARE * (1 + 1e-9);
  const power = Math.floor(Math.log10(most));
  // read as decimals, so that a bar is exactly 0.2 and never 0.2000000001; log10 may be off by one
  const steps = [power - 1, power, power + 1].flatMap((n) => [1, 2, 5].map((m) => Number(`${m}e${n}`)));
  const fitting = steps.filter((step) => step <= most);
  return fitting[fitting.length - 1] ?? most;
}

/**
 * What stands at a bar: '20 µm', '5 mm', '≈ 10 mm' when estimated. No uncertainty: the bar's look tells.
 * @throws {DomainError} `no-scale` for the grounds `none`; `not-positive`
 */
export function barLabel(um: number, grounds: Grounds): string {
  requirePositive(um, 'um');
  if (grounds === 'none') throw new DomainError('no-scale', 'A picture without scale has no bar.');
  const unit = unitFor(um);
  const value = Number((um / MICROMETRES_PER[unit]).toPrecision(12));
  const approximately = grounds === 'estimated' ? `≈${NO_BREAK_SPACE}` : '';
  return `${approximately}${value}${NO_BREAK_SPACE}${unit}`;
}

export interface BarLayout {
  readonly lengthUm: number;
  /** px of the picture that it is drawn into; a fraction of a pixel counts */
  readonly lengthPx: number;
  readonly label: string;
  readonly look: BarLook;
}

/**
 * The bar for a picture of this width.
 *
 * @param umPerPx µm per pixel *along x* of the picture that it is drawn into
 * @returns null when there is no scale: then words say so
 * @throws {DomainError} `not-positive`
 */
export function barLayout(input: {
  readonly imageWidthPx: number;
  readonly umPerPx: number | null;
  readonly grounds: Grounds;
}): BarLayout | null {
  const { imageWidthPx, umPerPx, grounds } = input;
  requirePositive(imageWidthPx, 'imageWidthPx');
  if (grounds === 'none' || umPerPx === null) return null;
  requirePositive(umPerPx, 'umPerPx');
  const lengthUm = chooseBar(imageWidthPx * umPerPx);
  return { lengthUm, lengthPx: lengthUm / umPerPx, label: barLabel(lengthUm, grounds), look: BAR_LOOK[grounds] };
}
