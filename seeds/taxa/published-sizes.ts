import { parse } from 'csv-parse/sync';
import type { Dimension } from '../../shared/annotations/structures.js';

/** One printed size of a species, as the file has it. */
export interface PrintedSize {
  readonly species: string;
  readonly author: string;
  readonly family: string;
  readonly structure: string;
  readonly dimension: Dimension;
  readonly minUm: number;
  readonly maxUm: number;
  readonly source: string;
  readonly year: number | null;
  readonly page: string;
  /** false: quoted from memory */
  readonly seen: boolean;
}

interface Line {
  taxon: string;
  author: string;
  family: string;
  character: string;
  min_um: string;
  max_um: string;
  source: string;
  page: string;
  seen_or_memory: string;
}

/**
 * What each character of the books is here. A diameter of a spore is its length, as a sphere's one measure is
 * kept; of a cap or a head it is the width, which is measured across. What has no structure of its own keeps
 * the book's word for it.
 */
const CHARACTERS: Readonly<Record<string, readonly [structure: string, Dimension]>> = {
  'spore length': ['spore', 'length'],
  'spore diameter': ['spore', 'length'],
  'spore width': ['spore', 'width'],
  'elater width': ['thread', 'width'],
  'capillitium thread diameter': ['thread', 'width'],
  'stipe height': ['stalk', 'length'],
  'stipe height maximum': ['stalk', 'length'],
  'sporangium height': ['head', 'length'],
  'sporangium diameter': ['head', 'width'],
  'cap diameter': ['cap', 'width'],
};

/**
 * @param text the CSV, with its header line
 * @throws {Error} for a size that is no number
 */
export function readPrintedSizes(text: string): PrintedSize[] {
  const lines = parse(text, { columns: true, skip_empty_lines: true }) as unknown as Line[];
  return lines.map((line) => {
    const [structure, dimension] = CHARACTERS[line.character] ?? [`other:${line.character}`, 'length' as const];
    const [minUm, maxUm] = [Number(line.min_um), Number(line.max_um)];
    if (!(minUm >= 0 && maxUm >= minUm))
      throw new Error(`${line.taxon}, ${line.character}: ${line.min_um}–${line.max_um}`);
    return {
      species: line.taxon,
      author: line.author,
      family: line.family,
      structure,
      dimension,
      minUm,
      maxUm,
      source: line.source,
      year: yearOf(line.source),
      page: line.page,
      seen: line.seen_or_memory === 'seen',
    };
  });
}

/** The year that a source is cited by, the first in it; null without one. */
function yearOf(source: string): number | null {
  const found = /\b(?:1[789]|20)\d\d\b/.exec(source);
  return found ? Number(found[0]) : null;
}
