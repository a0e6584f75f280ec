import { requireNotNegative, requirePositive } from '../errors.js';
import type { ImagePoint } from '../geometry/points.js';
import { referenceSpan } from './reference.js';
import type { Scale } from './scale.js';
import { combine, POINTING_PX, rectangular } from './uncertainty.js';

/**
 * Breadth of an index finger at its end joint when nothing is known of the person: women and men
 * mixed evenly. 15.5 (SD 1.0) and 18 (SD 1.1) mm are from memory, of the order given by
 * Greiner 1991 (US Army Natick TR-92/011) and Garrett 1971; the tables themselves were not seen.
 */
export const UNKNOWN_FINGER = mixture({ meanMm: 15.5, sdMm: 1.0 }, { meanMm: 18, sdMm: 1.1 });

/** A finger's outline is soft: standard uncertainty as a fraction. Common practice, no source. */
const EDGES = 0.03;
/** Finger and subject are seldom equally far from the lens; likewise. */
const PERSPECTIVE = 0.05;

/**
 * Scale of a picture with a finger in it.
 *
 * @param a and b: across the end joint of the index finger, image px
 * @param own the photographer's own finger, measured once with a ruler: its breadth, mm, and the limit
 *   to which it was measured, mm (half-width, rectangular). Null: a cautious 16.8 ± 1.6 mm
 * @returns grounds `estimated`; U ≈ ±23 % (k = 2) for an unknown finger, ±12 % for one's own
 * @throws {DomainError} `reference-too-short`, under 10 px; `not-positive`
 */
export function fingerScale(input: {
  readonly a: ImagePoint;
  readonly b: ImagePoint;
  readonly own: { readonly breadthMm: number; readonly measuredToMm: number } | null;
}): Scale {
  const { a, b, own } = input;
  const span = referenceSpan(a, b);
  if (own) {
    requirePositive(own.breadthMm, 'breadthMm');
    requireNotNegative(own.measuredToMm, 'measuredToMm');
  }
  const breadthMm = own ? own.breadthMm : UNKNOWN_FINGER.meanMm;
  const breadth = own ? rectangular(own.measuredToMm) / own.breadthMm : UNKNOWN_FINGER.sdMm / UNKNOWN_FINGER.meanMm;
  const umPerPx = (breadthMm * 1000) / span;
  return {
    umPerPxX: umPerPx,
    umPerPxY: umPerPx,
    relativeUncertainty: combine(breadth, EDGES, PERSPECTIVE, (Math.SQRT2 * POINTING_PX) / span),
    grounds: 'estimated',
  };
}

interface Breadth {
  readonly meanMm: number;
  /** spread between people, mm */
  readonly sdMm: number;
}

/** Two groups of equal weight: the spread within them and the half difference of their means, in quadrature. */
function mixture(a: Breadth, b: Breadth): Breadth {
  return {
    meanMm: (a.meanMm + b.meanMm) / 2,
    sdMm: Math.sqrt((a.sdMm ** 2 + b.sdMm ** 2) / 2 + ((a.meanMm - b.meanMm) / 2) ** 2),
  };
}
