/**
 * Structures: the named things that are measured. Each knows its way of measuring.
 *
 * To add one, add an entry here; the bench, the series and the exports follow.
 */

/**
 * Ways of measuring:
 * - `along-then-across`: one line along the body, a second across it (two values and their ratio Q)
 * - `across`: one line across (one width)
 * - `along`: one line along (one length)
 * - `along-bend`: a path that follows a bend (one length)
 */
export const WAYS = ['along-then-across', 'across', 'along', 'along-bend'] as const;
export type Way = (typeof WAYS)[number];

/** The dimensions of one body that a way yields, in the order in which they are measured. */
export const DIMENSIONS_OF: Record<Way, readonly Dimension[]> = {
  'along-then-across': ['length', 'width'],
  across: ['width'],
  along: ['length'],
  'along-bend': ['length'],
};
export type Dimension = 'length' | 'width';

export interface Structure {
  readonly id: string;
  readonly way: Way;
  /** the number of bodies that common practice asks for; spores: Parmasto & Parmasto 1987 advise 30 or more */
  readonly wanted: number;
}

export const STRUCTURES: readonly Structure[] = [
  { id: 'spore', way: 'along-then-across', wanted: 30 },
  { id: 'thread', way: 'across', wanted: 10 },
  { id: 'stalk', way: 'along-bend', wanted: 5 },
  { id: 'head', way: 'along-then-across', wanted: 5 },
  { id: 'spine', way: 'along', wanted: 10 },
  { id: 'cap', way: 'across', wanted: 5 },
  { id: 'gill-edge-cell', way: 'along-then-across', wanted: 20 },
  { id: 'segment', way: 'along-then-across', wanted: 5 },
  { id: 'shell', way: 'along-then-across', wanted: 3 },
];

/** Another structure is measured along one line and named by the observer: `other:hilar peg`. */
export const OTHER_PREFIX = 'other:';

/** The structure with this id, or a free one for `other:…`; null when the id is neither. */
export function structureOf(id: string): Structure | null {
  const known = STRUCTURES.find((structure) => structure.id === id);
  if (known) return known;
  return id.startsWith(OTHER_PREFIX) && id.trim().length > OTHER_PREFIX.length ? { id, way: 'along', wanted: 5 } : null;
}
