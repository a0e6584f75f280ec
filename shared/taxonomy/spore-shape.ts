import { DomainError, requirePositive } from '../errors.js';

export interface ShapeClass {
  readonly term: string;
  /** upper bound of Q, inclusive: a value equal to a bound takes the lower class (common practice, no source) */
  readonly to: number;
}

/** Shape by Q = length/breadth. Bas 1969, Persoonia 5:285–579 (attribution from memory). */
export const SPORE_SHAPES: readonly ShapeClass[] = [
  { term: 'globose', to: 1.05 },
  { term: 'subglobose', to: 1.15 },
  { term: 'broadly ellipsoid', to: 1.3 },
  { term: 'ellipsoid', to: 1.6 },
  { term: 'elongate', to: 2 },
  { term: 'cylindrical', to: 3 },
  { term: 'bacilliform', to: Infinity },
];

/**
 * Term for one Q, or for a mean Q. A body broader than long has the same outline turned, so below 1
 * the reciprocal counts.
 *
 * @throws {DomainError} `not-positive`
 * @example shapeTerm(1.4) // 'ellipsoid'
 */
export function shapeTerm(q: number): string {
  return shapeClass(q).term;
}

/**
 * 'ellipsoid', or 'subglobose to broadly ellipsoid' when the central range spans classes;
 * common practice, no source.
 * @param low and high: 5th and 95th percentile of Q
 */
export function shapeRange(low: number, high: number): string {
  if (low > high) throw new DomainError('range-reversed', `${low} is more than ${high}.`);
  const [from, to] = [shapeTerm(low), shapeTerm(high)];
  return from === to ? from : `${from} to ${to}`;
}

function shapeClass(q: number): ShapeClass {
  requirePositive(q, 'q');
  const ratio = q < 1 ? 1 / q : q;
  // 8.4/8.0 comes out a hair over 1.05
  return SPORE_SHAPES.find(({ to }) => ratio <= to * (1 + 1e-9)) as ShapeClass;
}

/** Length class of a spore; Watling 1973, *Identification of the larger fungi*: µm, a bound takes the lower class. */
export function lengthClass(lengthUm: number): 'small' | 'medium' | 'long' | 'very long' {
  requirePositive(lengthUm, 'lengthUm');
  if (lengthUm <= 5) return 'small';
  if (lengthUm <= 10) return 'medium';
  return lengthUm <= 15 ? 'long' : 'very long';
}
