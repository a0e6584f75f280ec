import { requirePositive } from '../errors.js';
import { roundDecimal } from '../units/decimals.js';
import { requireCount } from '../statistics/intervals.js';
import { quantile } from '../statistics/quantiles.js';
import { summarise } from '../statistics/summary.js';

/** Below this number percentiles say little: the range and the number alone. Common practice, no source. */
export const FEWEST_FOR_PERCENTILES = 20;

export interface SporeBody {
  readonly lengthUm: number;
  /** null: not measured, or a sphere with its one diameter as length */
  readonly widthUm: number | null;
}

/**
 * A spore set as descriptions print it: [a/b/c] (k–)m–n(–p) × … µm, Q = …, Qm = …
 *
 * a spores of b fruit bodies of c collections; k and p are the smallest and largest observed, m and n the
 * 5th and 95th percentile; a bracket that rounds like its neighbour is left out. Q is of single spores and
 * Qm the mean of those ratios, never the ratio of means. The spaces are ordinary ones: it is made for
 * copying into a manuscript.
 *
 * @param bodies       one entry per spore, µm
 * @param roundTo      µm; the finer only where the procedure justifies it
 * @param quantileType Hyndman & Fan's; 7 unless said
 * @returns null for no spores
 * @throws {DomainError} `not-positive`; `not-a-count`
 * @see Tulloss & Lindgren 2005, Mycotaxon 91:193–194
 */
export function notation(input: {
  readonly bodies: readonly SporeBody[];
  readonly fruitBodies: number;
  readonly collections: number;
  readonly roundTo: 0.1 | 0.5;
  readonly quantileType?: 7 | 6;
}): string | null {
  const { bodies, fruitBodies, collections, roundTo, quantileType = 7 } = input;
  requireCount(fruitBodies);
  requireCount(collections);
  bodies.forEach((body) => {
    requirePositive(body.lengthUm, 'lengthUm');
    if (body.widthUm !== null) requirePositive(body.widthUm, 'widthUm');
  });
  if (bodies.length === 0) return null;

  const print = roundTo === 0.1 ? toTenth : toHalf;
  const lengths = bodies.map((body) => body.lengthUm);
  const widths = bodies.flatMap((body) => body.widthUm ?? []);
  const ratios = bodies.flatMap((body) => (body.widthUm === null ? [] : body.lengthUm / body.widthUm));
  const sizes = [lengths, widths].filter((values) => values.length > 0);
  const text = [
    `[${bodies.length}/${fruitBodies}/${collections}]`,
    sizes.map((values) => rangeNotation(values, print, quantileType)).join(' × '),
    bodies.length < FEWEST_FOR_PERCENTILES ? `µm (n = ${bodies.length})` : 'µm',
  ].join(' ');
  const meanRatio = summarise(ratios)?.mean;
  return meanRatio === undefined
    ? text
    : `${text}, Q = ${rangeNotation(ratios, toHundredth, quantileType)}, Qm = ${toHundredth(meanRatio)}`;
}

/**
 * (k–)m–n(–p) of one dimension; k–p under twenty values.
 * @param print writes one figure; figures that print alike are one
 */
export function rangeNotation(values: readonly number[], print: (value: number) => string, type: 6 | 7): string {
  const printed = (p: number) => print(dustOff(quantile(values, p, type) ?? 0));
  const [least, most] = [printed(0), printed(1)];
  if (values.length < FEWEST_FOR_PERCENTILES) return span(least, most);
  const [low, high] = [printed(0.05), printed(0.95)];
  return `${least === low ? '' : `(${least}–)`}${span(low, high)}${most === high ? '' : `(–${most})`}`;
}

function span(low: string, high: string): string {
  return low === high ? low : `${low}–${high}`;
}

/** Interpolation leaves 7.6449999999999996 where 7.645 is meant. */
function dustOff(value: number): number {
  return Number(value.toPrecision(12));
}

const toTenth = (value: number) => roundDecimal(value, 1);
const toHundredth = (value: number) => roundDecimal(value, 2);
/** To the nearest half, '7' and '7.5'. */
const toHalf = (value: number) => String(Number(roundDecimal(2 * value, 0)) / 2);
