/**
 * Qualifiers of open nomenclature, which say how sure a name is.
 *
 * Sigovini, Keppel & Tagliapietra 2016, Methods Ecol. Evol. 7:1217–1225; the meanings are from memory
 * of that review. They go into dwc:identificationQualifier, never into dwc:scientificName.
 */

/**
 * Where a qualifier stands:
 * - `before-epithet`: before the last epithet, or before the name when its rank is genus or higher
 * - `after`: after the name
 */
export interface Qualifier {
  readonly term: string;
  readonly place: 'before-epithet' | 'after';
  readonly meaning: string;
}

export const QUALIFIERS: readonly Qualifier[] = [
  {
    term: 'cf.',
    place: 'before-epithet',
    meaning: 'looks like it; a needed character was not, or could not be, checked',
  },
  { term: 'aff.', place: 'before-epithet', meaning: 'near it but held to be distinct, often undescribed' },
  { term: 'nr.', place: 'before-epithet', meaning: 'near it; better said with aff.' },
  { term: 'gr.', place: 'before-epithet', meaning: 'one of its species group' },
  { term: '?', place: 'before-epithet', meaning: 'identification doubtful' },
  { term: 'inc.', place: 'after', meaning: 'identification doubtful' },
  { term: 'agg.', place: 'after', meaning: 'the aggregate of species under this name' },
  { term: 'sp.', place: 'after', meaning: 'genus only, one species' },
  { term: 'spp.', place: 'after', meaning: 'genus only, several species' },
  { term: 'indet.', place: 'after', meaning: 'cannot be taken further: poor, immature or incomplete material' },
  { term: 'stet.', place: 'after', meaning: 'deliberately left at this rank' },
];

/**
 * The qualifier that a written one begins with: `sp. 2` and `sp. "grey"` are kinds of `sp.`.
 * @returns null when it is none of the list
 */
export function qualifierOf(written: string): Qualifier | null {
  const first = written.trim().split(/\s+/)[0] ?? '';
  return QUALIFIERS.find(({ term }) => term === first) ?? null;
}
