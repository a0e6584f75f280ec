import { OTHER_PREFIX, STRUCTURES, structureOf, type Way } from '@shared/annotations/structures';

/** The key that takes each structure up; letters, since digits are for the view. */
export const STRUCTURE_KEYS: Readonly<Record<string, string>> = {
  spore: 's',
  thread: 't',
  stalk: 'k',
  head: 'h',
  spine: 'n',
  cap: 'c',
  'gill-edge-cell': 'g',
  segment: 'm',
  shell: 'l',
};
export const POINT_KEY = 'p';
export const ROUND_KEY = 'r';

/** Those that stand in the list from the first; the others follow when asked for, or once they are measured. */
export const COMMON_STRUCTURES: readonly string[] = ['spore', 'thread', 'stalk', 'head'];

export const KNOWN_STRUCTURES: readonly string[] = STRUCTURES.map(({ id }) => id);

/** How a structure is measured, as its line in the list says it. */
export function wayWords(structure: string): string {
  return wordsOf(structureOf(structure)?.way ?? 'along');
}

function wordsOf(way: Way): string {
  switch (way) {
    case 'along-then-across':
      return $localize`along, then across`;
    case 'across':
      return $localize`across`;
    case 'along':
      return $localize`along`;
    case 'along-bend':
      return $localize`along its bend`;
  }
}

/** The id of a structure that a person named: a known one is not made twice. */
export function structureNamed(words: string): string | null {
  const name = words.trim().replace(/\s+/g, ' ').toLowerCase();
  if (name === '') return null;
  const known = KNOWN_STRUCTURES.find((id) => id === name || id.replaceAll('-', ' ') === name);
  return known ?? `${OTHER_PREFIX}${name}`;
}
