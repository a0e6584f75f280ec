/** Kept for shared/place, which imports it from here; decimals live in units/, where lengths are written. */
export { decimalsFor, leadingPower, roundDecimal } from '../units/decimals.js';
