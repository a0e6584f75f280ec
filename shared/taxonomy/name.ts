import { qualifierOf } from './qualifiers.js';

/** Which code of nomenclature governs the name. Slime moulds, algae and fungi follow the botanical one. */
export type NameCode = 'botanical' | 'zoological';

export interface TaxonNameInput {
  /** without authorship and qualifier: 'Trichia varia', 'Stemonitis axifera var. smithii' */
  readonly name: string;
  /** 'species', 'genus', 'family'…; decides what is set in italics */
  readonly rank: string;
  readonly code: NameCode;
  /** '' or null for none */
  readonly authorship?: string | null;
  /** 'cf.', 'sp. 2'…; '' or null for none. One that isn't known stands after the name. */
  readonly qualifier?: string | null;
}

export interface NamePart {
  readonly text: string;
  readonly italic: boolean;
}

/** Ranks above genus; everything else counts as genus or below. */
const ABOVE_GENUS: ReadonlySet<string> = new Set(
  ['', 'sub', 'super', 'infra'].flatMap((prefix) =>
    ['domain', 'kingdom', 'phylum', 'division', 'class', 'order', 'family', 'tribe'].map((rank) => prefix + rank),
  ),
);

/** Words inside a name that are not names: ranks and the sign of a hybrid. */
const CONNECTORS: ReadonlySet<string> = new Set([
  'subsp.',
  'ssp.',
  'var.',
  'subvar.',
  'f.',
  'subf.',
  'f.sp.',
  'subg.',
  'subgen.',
  'sect.',
  'subsect.',
  'ser.',
  '×',
]);

/**
 * A scientific name in pieces of one typeface, to be set one after the other; spaces are in the pieces.
 *
 * Genus and below are italic. Above genus the botanical code prints all its names in italics
 * (International Code of Nomenclature for algae, fungi, and plants, 2018, preface; from memory), while
 * zoological names above genus are roman (International Code of Zoological Nomenclature 1999, App. B6;
 * from memory). Connectors, qualifiers and authors are roman.
 *
 * A qualifier stands before the epithet that is doubted, the last one, or before a name of one word:
 * 'Trichia cf. varia', 'cf. Trichia'. Naming the genus only ('sp.') leaves no authorship to quote.
 *
 * @example nameParts({ name: 'Trichia varia', rank: 'species', code: 'botanical', qualifier: 'cf.' })
 *   // [Trichia] cf. [varia], brackets for italics
 */
export function nameParts(input: TaxonNameInput): NamePart[] {
  const words = input.name.split(/\s+/).filter(Boolean);
  const italicName = input.code === 'botanical' || !ABOVE_GENUS.has(input.rank.toLowerCase());
  const set: NamePart[] = words.map((text) => ({ text, italic: italicName && !CONNECTORS.has(text) }));
  const qualifier = input.qualifier?.trim() ?? '';
  const known = qualifierOf(qualifier);
  const authorship = input.authorship?.trim() ?? '';

  if (qualifier && known?.place === 'before-epithet') {
    set.splice(Math.max(0, doubtedAt(words)), 0, { text: qualifier, italic: false });
  }
  const after = qualifier && known?.place !== 'before-epithet' ? qualifier : '';
  const quoted = known && GENUS_ONLY.has(known.term) ? '' : authorship;
  for (const text of known?.term === 'agg.' ? [after] : [quoted, after]) {
    if (text) set.push({ text, italic: false });
  }
  return joined(set);
}

/** The same in plain text. */
export function plainName(input: TaxonNameInput): string {
  return nameParts(input)
    .map((part) => part.text)
    .join('');
}

const GENUS_ONLY: ReadonlySet<string> = new Set(['sp.', 'spp.']);

/** Place of the doubted word: the last epithet, with the rank that introduces it ('cf. var. smithii'). */
function doubtedAt(words: readonly string[]): number {
  const last = words.length - 1;
  return last > 0 && CONNECTORS.has(words[last - 1] as string) ? last - 1 : last;
}

/** Puts the spaces in, and neighbours of one typeface together. */
function joined(parts: readonly NamePart[]): NamePart[] {
  return parts.reduce<NamePart[]>((done, part) => {
    const last = done[done.length - 1];
    if (!last) return [part];
    if (last.italic === part.italic) return [...done.slice(0, -1), { ...last, text: `${last.text} ${part.text}` }];
    // the space goes to the roman side, where it isn't slanted
    return last.italic
      ? [...done, { ...part, text: ` ${part.text}` }]
      : [...done.slice(0, -1), { ...last, text: `${last.text} ` }, part];
  }, []);
}
