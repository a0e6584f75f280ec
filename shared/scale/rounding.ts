import { requireFinite, requireNotNegative, requirePositive } from '../errors.js';
import { MICROMETRES_PER, MILLIMETRES_FROM_UM, NO_BREAK_SPACE, unitFor } from '../units/length.js';
import { decimalsFor, leadingPower, roundDecimal } from '../units/decimals.js';
import type { Scale } from './scale.js';
import { expanded } from './uncertainty.js';

/**
 * A value and its uncertainty as they are printed: the uncertainty to two significant digits, the value
 * to the same place. Halves go away from zero.
 *
 * @param value       any unit
 * @param uncertainty u or U in the same unit, positive
 * @param significant digits of the uncertainty, 1 or 2
 * @throws {DomainError} `not-positive`; `not-finite`
 * @see JCGM 100:2008 §7.2.6; NIST GLP 9 (NISTIR 6969, 2019)
 * @example roundToUncertainty(10.05762, 0.027) // { value: '10.058', uncertainty: '0.027' }
 */
export function roundToUncertainty(
  value: number,
  uncertainty: number,
  significant = 2,
): { value: string; uncertainty: string } {
  requireFinite([value], 'value');
  requirePositive(uncertainty, 'uncertainty');
  const decimals = decimalsFor(uncertainty, significant);
  return { value: roundDecimal(value, decimals), uncertainty: roundDecimal(uncertainty, decimals) };
}

export interface QuantityParts {
  /** goes with ≈, and with its range instead of ± */
  readonly approx: boolean;
  readonly value: string;
  /** U, k = 2, in `unit`; '0' when nothing is uncertain */
  readonly uncertainty: string;
  readonly unit: 'µm' | 'mm';
  /** ends of value ± U, in `unit`, never below 0; for estimates rounded outward */
  readonly low: string;
  readonly high: string;
}

/** Above this U/value an estimate is worth one digit, below it two; common practice, no source. */
const ONE_DIGIT_FROM = 0.15;

/**
 * The parts of a length as it is shown.
 *
 * @param valueUm µm, not negative
 * @param uUm     combined *standard* uncertainty (k = 1), µm; it is expanded here
 * @throws {DomainError} `not-positive`; `not-finite`
 */
export function quantityParts(valueUm: number, uUm: number, grounds: Scale['grounds']): QuantityParts {
  requireNotNegative(valueUm, 'valueUm');
  requireNotNegative(uUm, 'uUm');
  return grounds === 'estimated' ? estimatedParts(valueUm, expanded(uUm)) : statedParts(valueUm, expanded(uUm));
}

/**
 * The length as one text: '10.17 ± 0.30 µm', or '≈ 8 mm (6–10 mm)' for an estimate.
 * k = 2 is said once where such texts stand. All spaces but the one before the bracket are no-break.
 */
export function quantityText(valueUm: number, uUm: number, grounds: Scale['grounds']): string {
  const parts = quantityParts(valueUm, uUm, grounds);
  return parts.approx
    ? `${approximately(parts)} ${rangeText(parts)}`
    : [parts.value, '±', parts.uncertainty, parts.unit].join(NO_BREAK_SPACE);
}

/** '≈ 8 mm' */
export function approximately(parts: QuantityParts): string {
  return ['≈', parts.value, parts.unit].join(NO_BREAK_SPACE);
}

/** '(6–10 mm)' */
export function rangeText(parts: QuantityParts): string {
  return `(${parts.low}–${parts.high}${NO_BREAK_SPACE}${parts.unit})`;
}

function statedParts(valueUm: number, UUm: number): QuantityParts {
  const unit = unitFor(valueUm);
  const [value, U] = [valueUm / MICROMETRES_PER[unit], UUm / MICROMETRES_PER[unit]];
  if (U === 0) {
    const exact = String(value);
    return { approx: false, value: exact, uncertainty: '0', unit, low: exact, high: exact };
  }
  const decimals = decimalsFor(U, 2);
  return {
    approx: false,
    ...roundToUncertainty(value, U),
    unit,
    low: roundDecimal(Math.max(0, value - U), decimals),
    high: roundDecimal(value + U, decimals),
  };
}

function estimatedParts(valueUm: number, UUm: number): QuantityParts {
  if (valueUm === 0) {
    const high = UUm === 0 ? '0' : roundDecimal(UUm, -leadingPower(UUm), 'ceil');
    return { approx: true, value: '0', uncertainty: high, unit: 'µm', low: '0', high };
  }
  const significant = UUm / valueUm > ONE_DIGIT_FROM ? 1 : 2;
  // 990 µm to one digit is 1 mm, not 1000 µm: the unit follows what is printed
  const printedUm = Number(roundDecimal(valueUm, significant - 1 - leadingPower(valueUm)));
  const unit = printedUm < MILLIMETRES_FROM_UM ? 'µm' : 'mm';
  const [value, U] = [valueUm / MICROMETRES_PER[unit], UUm / MICROMETRES_PER[unit]];
  const decimals = significant - 1 - leadingPower(value);
  const least = Math.max(0, value - U);
  // An end below the value's first digit gets a place of its own: 0.8–2 mm rather than 0–2 mm.
  const lowDecimals = least === 0 ? decimals : Math.max(decimals, significant - 1 - leadingPower(least));
  return {
    approx: true,
    value: roundDecimal(value, decimalsFor(value, significant)),
    uncertainty: U === 0 ? '0' : roundDecimal(U, Math.max(decimals, -leadingPower(U)), 'ceil'),
    unit,
    low: least === 0 ? '0' : roundDecimal(least, lowDecimals, 'floor'),
    high: roundDecimal(value + U, decimals, 'ceil'),
  };
}
