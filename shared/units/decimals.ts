import { DomainError } from '../errors.js';

/**
 * Rounds a number as it is *written*: halves away from zero, on its shortest decimal form.
 *
 * `toFixed` rounds the binary value, so 1.005 becomes 1.00 and 2.5 becomes 3 but 1.45 becomes 1.4;
 * a reader who checks by hand should get what we print. Half-even (1234 for 1234.5) was rejected:
 * field guides and school rounding go away from zero.
 *
 * @param decimals places after the point; negative rounds to tens, hundreds…
 * @param towards  `nearest` unless an end of a range must not be cut short
 * @throws {DomainError} `not-finite`
 * @example roundDecimal(1234.5, 0) // '1235'
 */
export function roundDecimal(
  value: number,
  decimals: number,
  towards: 'nearest' | 'floor' | 'ceil' = 'nearest',
): string {
  if (!Number.isFinite(value)) throw new DomainError('not-finite', `Can't write ${value}.`);
  const [mantissa, exponent] = Math.abs(value).toExponential().split('e') as [string, string];
  const digits = mantissa.replace('.', '');
  // value = digits × 10^shift, wanted as a whole number of 10^−decimals
  const shift = Number(exponent) - (digits.length - 1) + decimals;
  let whole: bigint;
  if (shift >= 0) {
    whole = BigInt(digits) * 10n ** BigInt(shift);
  } else {
    const unit = 10n ** BigInt(-shift);
    const rest = BigInt(digits) % unit;
    whole = BigInt(digits) / unit;
    const outward = towards === (value < 0 ? 'floor' : 'ceil') ? rest > 0n : towards === 'nearest' && rest * 2n >= unit;
    if (outward) whole += 1n;
  }
  const sign = value < 0 && whole > 0n ? '-' : '';
  if (decimals <= 0) return `${sign}${whole * 10n ** BigInt(-decimals)}`;
  const text = whole.toString().padStart(decimals + 1, '0');
  return `${sign}${text.slice(0, -decimals)}.${text.slice(-decimals)}`;
}

/** Power of ten of the first digit: 2 for 276, −2 for 0.027. Of the value as written, so 0.1 gives −1. */
export function leadingPower(value: number): number {
  if (!(value !== 0 && Number.isFinite(value))) throw new DomainError('not-finite', `${value} has no first digit.`);
  return Number(Math.abs(value).toExponential().split('e')[1]);
}

/** Decimal places that keep so many significant digits of a value, after rounding it (0.0996 → 0.10). */
export function decimalsFor(value: number, significant: number): number {
  const decimals = significant - 1 - leadingPower(value);
  const rounded = Number(roundDecimal(value, decimals));
  return leadingPower(rounded) > leadingPower(value) ? decimals - 1 : decimals;
}
