import { OTHER_PREFIX } from '@shared/annotations/structures';

const WORDS: Readonly<Record<string, string>> = {
  spore: $localize`Spore`,
  thread: $localize`Thread`,
  stalk: $localize`Stalk`,
  head: $localize`Head`,
  spine: $localize`Spine`,
  cap: $localize`Cap`,
  'gill-edge-cell': $localize`Gill edge cell`,
  segment: $localize`Segment`,
  shell: $localize`Shell`,
};

/** A structure as people read it; a free one (`other:hilar peg`) is called what its observer called it. */
export function structureWords(id: string): string {
  const known = WORDS[id];
  if (known) return known;
  const own = id.startsWith(OTHER_PREFIX) ? id.slice(OTHER_PREFIX.length).trim() : id;
  return own.charAt(0).toLocaleUpperCase() + own.slice(1);
}
