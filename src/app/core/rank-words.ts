const WORDS: Readonly<Record<string, string>> = {
  kingdom: $localize`kingdom`,
  phylum: $localize`phylum`,
  class: $localize`class`,
  order: $localize`order`,
  family: $localize`family`,
  genus: $localize`genus`,
  species: $localize`species`,
  variety: $localize`variety`,
};

/** A rank as people read it. */
export function rankWords(rank: string): string {
  return WORDS[rank] ?? rank;
}
