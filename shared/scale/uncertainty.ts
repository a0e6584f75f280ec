import { requireFinite, requireNotNegative } from '../errors.js';
import { halfWidth95 } from '../statistics/coverage.js';
import type { Scale } from './scale.js';

/*
 * Uncertainty after the Guide to the Expression of Uncertainty in Measurement,
 * JCGM 100:2008 (paragraph numbers from memory).
 */

/**
 * Standard uncertainty of one end that a person placed, image px: what repeated pointing at a sharp
 * edge scatters by. Common practice, no source. A bare ±½ px limit (0.29 px) would claim too much.
 */
export const POINTING_PX = 0.5;

/** Coverage factor of every quoted U, about 95 %; JCGM 100:2008 §6.3.3. */
export const COVERAGE_FACTOR = 2;

/** Root of the sum of squares of independent parts in one unit; JCGM 100:2008 §5.1.2. */
export function combine(...parts: readonly number[]): number {
  requireFinite(parts, 'parts');
  return Math.hypot(...parts);
}

/** Expanded uncertainty U = k·u with k = 2. */
export function expanded(u: number): number {
  requireNotNegative(u, 'u');
  return COVERAGE_FACTOR * u;
}

/** Standard uncertainty of a value anywhere within ± halfWidth alike: a/√3; JCGM 100:2008 §4.3.7. */
export function rectangular(halfWidth: number): number {
  requireNotNegative(halfWidth, 'halfWidth');
  return halfWidth / Math.sqrt(3);
}

/** Standard uncertainty of a value likeliest in the middle of ± halfWidth: a/√6; JCGM 100:2008 §4.3.9. */
export function triangular(halfWidth: number): number {
  requireNotNegative(halfWidth, 'halfWidth');
  return halfWidth / Math.sqrt(6);
}

/** Standard uncertainty of reading in whole steps: q/√12; JCGM 100:2008 §F.2.2.1. */
export function resolution(step: number): number {
  requireNotNegative(step, 'step');
  return step / Math.sqrt(12);
}

/**
 * Degrees of freedom of a combined uncertainty; Infinity when no part is limited.
 *
 * @param parts standard uncertainties in one unit; `degreesOfFreedom` null or Infinity: not from a sample
 * @see JCGM 100:2008 §G.4.1
 */
export function welchSatterthwaite(
  parts: readonly { readonly u: number; readonly degreesOfFreedom: number | null }[],
): number {
  requireFinite(
    parts.map((part) => part.u),
    'parts',
  );
  const limited = parts.reduce((total, part) => total + part.u ** 4 / (part.degreesOfFreedom ?? Infinity), 0);
  return limited === 0 ? Infinity : combine(...parts.map((part) => part.u)) ** 4 / limited;
}

/**
 * Standard uncertainty of a length from doubt about where its two edges lie.
 * @param halfWidthUm limit of either edge, µm, rectangular, the two independent
 */
export function edgeUncertainty(halfWidthUm: number): number {
  return Math.SQRT2 * rectangular(halfWidthUm);
}

export interface Contribution {
  readonly source: 'scale' | 'pointing' | 'edge';
  /** standard uncertainty, µm */
  readonly u: number;
}

export interface LengthBudget {
  readonly lengthUm: number;
  readonly contributions: readonly Contribution[];
  /** combined standard uncertainty, µm */
  readonly u: number;
  /** expanded, k = 2, µm: the figure to quote */
  readonly U: number;
  /** half-width of the 95 % interval, µm: the same as U but for the shape of what goes into it */
  readonly halfWidth95: number;
}

/**
 * A straight length with all that makes it uncertain.
 *
 * @param lengthPx   signed extent along x and y, image px
 * @param pointingPx standard uncertainty of each end in each direction, image px
 * @param edgeUm     standard uncertainty of the length from where its edges were taken, µm (`edgeUncertainty`)
 * @throws {DomainError} `not-finite`; `not-positive` for negative uncertainties
 * @see JCGM 100:2008 §5.1.2, sensitivities of L = √((sx·Δx)² + (sy·Δy)²)
 * @example lengthBudget({ lengthPx: { dx: 47.3, dy: 0 }, scale, pointingPx: 0.495 }) // 10.17 µm, u 0.15 µm
 */
export function lengthBudget(input: {
  readonly lengthPx: { readonly dx: number; readonly dy: number };
  readonly scale: Scale;
  readonly pointingPx: number;
  readonly edgeUm?: number;
}): LengthBudget {
  const { lengthPx, scale, pointingPx, edgeUm } = input;
  requireFinite([lengthPx.dx, lengthPx.dy], 'lengthPx');
  requireNotNegative(pointingPx, 'pointingPx');
  requireNotNegative(edgeUm ?? 0, 'edgeUm');
  const xUm = scale.umPerPxX * lengthPx.dx;
  const yUm = scale.umPerPxY * lengthPx.dy;
  const lengthUm = Math.hypot(xUm, yUm);
  // µm of length per px of either end; at no length there is no direction, so the coarser axis counts
  const umPerEndPx =
    lengthUm === 0
      ? Math.max(scale.umPerPxX, scale.umPerPxY)
      : Math.hypot(scale.umPerPxX * xUm, scale.umPerPxY * yUm) / lengthUm;
  const pointing = Math.SQRT2 * pointingPx * umPerEndPx;
  const contributions: Contribution[] = [
    { source: 'scale', u: scale.relativeUncertainty * lengthUm },
    { source: 'pointing', u: pointing },
  ];
  if (edgeUm !== undefined) contributions.push({ source: 'edge', u: edgeUm });
  const u = combine(...contributions.map((part) => part.u));
  const scalePart = splitScale(scale, lengthUm);
  return {
    lengthUm,
    contributions,
    u,
    U: expanded(u),
    halfWidth95: halfWidth95({ normal: combine(pointing, edgeUm ?? 0, scalePart.normal), limit: scalePart.limit }),
  };
}

/**
 * What a scale adds to a length, parted into a spread and a limit.
 * @returns `normal`, standard uncertainty, and `limit`, half-width of a rectangular part; both in the length's unit
 */
export function splitScale(
  scale: { readonly relativeUncertainty: number; readonly limitFraction?: number },
  length: number,
): { normal: number; limit: number } {
  const limit = Math.min(scale.limitFraction ?? 0, Math.sqrt(3) * scale.relativeUncertainty);
  const normal = Math.sqrt(Math.max(0, scale.relativeUncertainty ** 2 - rectangular(limit) ** 2));
  return { normal: normal * Math.abs(length), limit: limit * Math.abs(length) };
}
