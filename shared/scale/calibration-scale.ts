import { DomainError } from '../errors.js';
import type { CalibrationFit } from './calibration.js';
import type { Scale } from './scale.js';

/** Two rulings may depart this far from a right angle. */
const MOST_FROM_PERPENDICULAR = Math.PI / 6;

/**
 * Below this sin·sin the rulings lie so near the diagonals that x and y can't be told apart:
 * both directions see the same mixture. 0.5 leaves about 15° on either side of a diagonal.
 */
const LEAST_SEPARATION = 0.5;

/**
 * The scale of a picture from one ruling or from two across each other.
 *
 * One ruling: x and y get the same µm/px, that is, pixels are taken as square.
 * Two, within 30° of perpendicular: a length along direction θ covers
 * s(θ)² = sx²·cos²θ + sy²·sin²θ, two linear equations for sx² and sy².
 *
 * @returns grounds `calibrated`; with two rulings the larger of both axes' relative uncertainties,
 *   for the rulings are on one slide and err together
 * @throws {DomainError} `too-few-rulings`; `too-many-rulings`; `rulings-not-perpendicular`;
 *   `rulings-diagonal`, near 45°, where only square pixels could be solved for
 */
export function calibrationScale(fits: readonly CalibrationFit[]): Scale {
  const [first, second] = fits;
  if (!first) throw new DomainError('too-few-rulings', 'Needs one ruling.');
  if (fits.length > 2) throw new DomainError('too-many-rulings', `Takes two rulings, got ${fits.length}.`);
  if (!second) {
    return {
      umPerPxX: first.umPerPx,
      umPerPxY: first.umPerPx,
      relativeUncertainty: first.relativeUncertainty,
      grounds: 'calibrated',
      limitFraction: first.limitFraction,
    };
  }
  return fromTwo(first, second);
}

function fromTwo(a: CalibrationFit, b: CalibrationFit): Scale {
  const between = Math.abs(Math.sin(b.direction - a.direction));
  if (!(between >= Math.cos(MOST_FROM_PERPENDICULAR))) {
    throw new DomainError('rulings-not-perpendicular', 'The two rulings must lie across each other.', {
      degrees: Math.round((Math.asin(between) * 180) / Math.PI),
    });
  }
  const [ca, sa] = [Math.cos(a.direction) ** 2, Math.sin(a.direction) ** 2];
  const [cb, sb] = [Math.cos(b.direction) ** 2, Math.sin(b.direction) ** 2];
  const determinant = ca * sb - cb * sa; // sin(β − α)·sin(β + α)
  const [qa, qb] = [a.umPerPx ** 2, b.umPerPx ** 2];
  const x2 = (qa * sb - qb * sa) / determinant;
  const y2 = (qb * ca - qa * cb) / determinant;
  if (!(Math.abs(determinant) >= LEAST_SEPARATION && x2 > 0 && y2 > 0)) {
    throw new DomainError('rulings-diagonal', 'Lay the rulings along the edges of the picture, not diagonally.');
  }
  // u(q)/q = 2·u(s)/s on the way in, halved again on the way out
  const relative = (wa: number, wb: number, result: number) =>
    Math.hypot(wa * qa * a.relativeUncertainty, wb * qb * b.relativeUncertainty) / Math.abs(determinant * result);
  return {
    umPerPxX: Math.sqrt(x2),
    umPerPxY: Math.sqrt(y2),
    relativeUncertainty: Math.max(
      relative(sb, sa, x2),
      relative(cb, ca, y2),
      a.relativeUncertainty,
      b.relativeUncertainty,
    ),
    grounds: 'calibrated',
    limitFraction: Math.max(a.limitFraction, b.limitFraction),
  };
}
