import { DomainError, requireNotNegative, requirePositive } from '../errors.js';
import type { ImagePoint } from '../geometry/points.js';
import { distance } from '../geometry/points.js';
import { referenceTooShort, SHORTEST_REFERENCE_PX } from './calibration.js';
import type { Scale } from './scale.js';
import { combine, POINTING_PX, rectangular } from './uncertainty.js';

/**
 * Scale of a picture, from a ruler or an object of known size in the frame.
 *
 * @param a and b: ends of the reference, image px
 * @param lengthUm    true length between them, µm
 * @param toleranceUm limit of that length, µm, half-width, rectangular
 * @param pointingPx  standard uncertainty of each end, image px
 * @param heightMm    limit of how far reference and subject lie apart along the view, and
 * @param distanceMm  distance of the lens's entrance pupil to the subject; both or neither
 * @param tiltDegrees limit of how far the subject leans against the reference's plane
 * @returns grounds `referenced`; pixels are taken as square
 * @throws {DomainError} `reference-too-short`, under 10 px; `not-positive`; `height-without-distance`
 * @see JCGM 100:2008 §5.1.2: independent errors add in quadrature
 * @example referenceScale({ a: px(0, 0), b: px(300, 400), lengthUm: 10_000, toleranceUm: 0 }) // 20 µm/px
 */
export function referenceScale(input: {
  readonly a: ImagePoint;
  readonly b: ImagePoint;
  readonly lengthUm: number;
  readonly toleranceUm: number;
  readonly pointingPx?: number;
  readonly heightMm?: number;
  readonly distanceMm?: number;
  readonly tiltDegrees?: number;
}): Scale {
  const { a, b, lengthUm, toleranceUm, pointingPx = POINTING_PX, heightMm, distanceMm, tiltDegrees = 0 } = input;
  requirePositive(lengthUm, 'lengthUm');
  requireNotNegative(toleranceUm, 'toleranceUm');
  requireNotNegative(pointingPx, 'pointingPx');
  if ((heightMm === undefined) !== (distanceMm === undefined)) {
    throw new DomainError('height-without-distance', 'A height says nothing without the distance of the lens.');
  }
  const span = referenceSpan(a, b);
  const limitFraction = toleranceUm / lengthUm;
  const perspective =
    heightMm === undefined || distanceMm === undefined ? 0 : Math.abs(heightOffsetError(heightMm, distanceMm));
  return {
    umPerPxX: lengthUm / span,
    umPerPxY: lengthUm / span,
    relativeUncertainty: combine(
      rectangular(limitFraction),
      (Math.SQRT2 * pointingPx) / span,
      rectangular(perspective),
      rectangular(Math.abs(tiltError(tiltDegrees))),
    ),
    grounds: 'referenced',
    limitFraction,
  };
}

/**
 * Length of a marked reference, image px.
 * @throws {DomainError} `reference-too-short`, also for NaN
 */
export function referenceSpan(a: ImagePoint, b: ImagePoint): number {
  const span = distance(a, b);
  if (!(span >= SHORTEST_REFERENCE_PX && Number.isFinite(span))) throw referenceTooShort(span);
  return span;
}

/**
 * By what fraction the subject is misread when the reference lies nearer to the lens.
 *
 * @param nearerMm   how much nearer the reference lies than the subject; negative when farther
 * @param distanceMm from the lens to the subject, positive, more than `nearerMm`
 * @returns −Δz/z: a nearer reference looks larger, so the subject is under-read
 * @throws {DomainError} `not-positive`; `reference-behind-lens`
 * @see similar triangles of the pinhole model
 * @example heightOffsetError(10, 300) // −0.0333
 */
export function heightOffsetError(nearerMm: number, distanceMm: number): number {
  requirePositive(distanceMm, 'distanceMm');
  if (!(nearerMm < distanceMm))
    throw new DomainError('reference-behind-lens', 'The reference must lie before the lens.');
  return -nearerMm / distanceMm;
}

/**
 * By what fraction a length that leans against the image plane is under-read: cos θ − 1.
 * @param degrees −90 to 90
 * @throws {DomainError} `not-an-angle`
 */
export function tiltError(degrees: number): number {
  if (!(Math.abs(degrees) <= 90)) throw new DomainError('not-an-angle', `Must lie within ±90°, was ${degrees}.`);
  return Math.cos((degrees * Math.PI) / 180) - 1;
}

export { KNOWN_OBJECTS, knownObject, type KnownObject } from './known-objects.js';
