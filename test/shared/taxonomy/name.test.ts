import { describe, expect, it } from 'vitest';
import type { TaxonNameInput } from '../../../shared/taxonomy/name.js';
import { nameParts, plainName } from '../../../shared/taxonomy/name.js';
import { QUALIFIERS, qualifierOf } from '../../../shared/taxonomy/qualifiers.js';

/** Italics in underscores. */
const set = (input: Partial<TaxonNameInput>) =>
  nameParts({ name: 'Trichia varia', rank: 'species', code: 'botanical', ...input })
    .map(({ text, italic }) => (italic ? `_${text}_` : text))
    .join('');

describe('a scientific name', () => {
  it('is italic for genus and below, and its author roman', () => {
    expect(set({})).toBe('_Trichia varia_');
    expect(set({ authorship: '(Pers. ex J.F.Gmel.) Pers.' })).toBe('_Trichia varia_ (Pers. ex J.F.Gmel.) Pers.');
    expect(set({ name: 'Arcyria', rank: 'genus', authorship: 'F.H.Wigg.' })).toBe('_Arcyria_ F.H.Wigg.');
    expect(set({ name: 'Lepisma saccharina', code: 'zoological' })).toBe('_Lepisma saccharina_');
  });

  it('above genus is italic only under the botanical code', () => {
    expect(set({ name: 'Trichiaceae', rank: 'family' })).toBe('_Trichiaceae_');
    expect(set({ name: 'Entomobryidae', rank: 'family', code: 'zoological' })).toBe('Entomobryidae');
    expect(set({ name: 'Entomobryoidea', rank: 'superfamily', code: 'zoological' })).toBe('Entomobryoidea');
    expect(set({ name: 'Collembola', rank: 'Class', code: 'zoological' })).toBe('Collembola');
    expect(set({ name: 'Orchesella', rank: 'genus', code: 'zoological' })).toBe('_Orchesella_');
  });

  it('has roman ranks and hybrid signs inside', () => {
    expect(set({ name: 'Stemonitis axifera var. smithii', rank: 'variety' })).toBe(
      '_Stemonitis axifera_ var. _smithii_',
    );
    expect(set({ name: 'Drosera × obovata' })).toBe('_Drosera_ × _obovata_');
  });

  it.each([
    ['cf.', '_Trichia_ cf. _varia_'],
    ['aff.', '_Trichia_ aff. _varia_'],
    ['?', '_Trichia_ ? _varia_'],
    ['indet.', '_Trichia varia_ indet.'],
    ['agg.', '_Trichia varia_ agg.'],
    ['', '_Trichia varia_'],
    ['perhaps', '_Trichia varia_ perhaps'],
  ])('with %s reads %s', (qualifier, text) => {
    expect(set({ qualifier })).toBe(text); // Sigovini, Keppel & Tagliapietra 2016, Methods Ecol. Evol. 7:1217–1225
  });

  it('is doubted at its last epithet, or as a whole when it has one word', () => {
    expect(set({ name: 'Trichia', rank: 'genus', qualifier: 'cf.' })).toBe('cf. _Trichia_');
    expect(set({ name: 'Stemonitis axifera var. smithii', rank: 'variety', qualifier: 'cf.' })).toBe(
      '_Stemonitis axifera_ cf. var. _smithii_',
    );
    expect(set({ name: 'Collembola', rank: 'class', code: 'zoological', qualifier: 'cf.' })).toBe('cf. Collembola');
  });

  it('of a genus only has no author to quote', () => {
    expect(set({ name: 'Trichia', rank: 'genus', qualifier: 'sp. 2', authorship: 'Haller' })).toBe('_Trichia_ sp. 2');
  });

  it('keeps its author with a doubt', () => {
    expect(set({ qualifier: 'cf.', authorship: 'Pers.' })).toBe('_Trichia_ cf. _varia_ Pers.');
    expect(
      plainName({ name: 'Trichia varia', rank: 'species', code: 'botanical', qualifier: 'cf.', authorship: 'Pers.' }),
    ).toBe('Trichia cf. varia Pers.');
  });

  it('survives stray spaces and an empty name', () => {
    expect(set({ name: '  Trichia   varia ' })).toBe('_Trichia varia_');
    expect(set({ name: '' })).toBe('');
    expect(set({ name: '', qualifier: 'cf.' })).toBe('cf.');
  });
});

describe('qualifiers', () => {
  it('are known by their first word', () => {
    expect(qualifierOf('sp. "grey"')?.term).toBe('sp.');
    expect(qualifierOf('perhaps')).toBeNull();
    expect(qualifierOf('')).toBeNull();
    expect(new Set(QUALIFIERS.map(({ term }) => term)).size).toBe(QUALIFIERS.length);
  });
});
