import { DomainError } from '../errors.js';
import { roundDecimal } from './decimals.js';

/** A length in micrometres, the one unit that lengths are stored in. */
export type Micrometres = number;

/**
 * Micrometres in one of each unit; exact. The inch is 25.4 mm by definition
 * (international yard and pound agreement, 1959; from memory).
 */
export const MICROMETRES_PER = {
  nm: 0.001,
  µm: 1,
  mm: 1_000,
  cm: 10_000,
  m: 1_000_000,
  in: 25_400,
} as const;
export type LengthUnit = keyof typeof MICROMETRES_PER;

/** Between a number and its unit, so that a line never ends between them. */
export const NO_BREAK_SPACE = '\u00A0';

/** From here on lengths are written in mm; common practice, no source. */
export const MILLIMETRES_FROM_UM = 1_000;

/**
 * @param value a finite number of `unit`
 * @returns the same length in µm
 * @throws {DomainError} `not-finite`
 * @example toMicrometres(1, 'in') // 25400
 */
export function toMicrometres(value: number, unit: LengthUnit): Micrometres {
  if (!Number.isFinite(value)) throw new DomainError('not-finite', `A length must be finite, was ${value}.`);
  // 0.001 is not exact in binary; a division by 1000 is rounded only once.
  return unit === 'nm' ? value / 1_000 : value * MICROMETRES_PER[unit];
}

/** The unit in which a length is written: µm under 1000 µm, then mm. */
export function unitFor(um: Micrometres): 'µm' | 'mm' {
  return Math.abs(um) < MILLIMETRES_FROM_UM ? 'µm' : 'mm';
}

/**
 * A bare length for places that state its uncertainty elsewhere.
 *
 * @param um     µm
 * @param digits decimal places in the unit that is written
 * @throws {DomainError} `not-finite`
 * @example formatLength(2500, 1) // '2.5 mm', with a no-break space
 */
export function formatLength(um: Micrometres, digits: number): string {
  if (!Number.isFinite(um)) throw new DomainError('not-finite', `A length must be finite, was ${um}.`);
  const unit = unitFor(um);
  return `${roundDecimal(um / MICROMETRES_PER[unit], digits)}${NO_BREAK_SPACE}${unit}`;
}
