import type { FindView, NewFind } from '../../../shared/contracts/finds.js';
import type { TaxonName } from '../../../shared/contracts/taxa.js';
import type { Browser } from '../app.js';

/** A whole request for a find, with what a test wants otherwise. */
export function newFind(imageIds: readonly string[], wanted: Partial<Omit<NewFind, 'imageIds'>> = {}): NewFind {
  return {
    imageIds: [...imageIds],
    observation: { kind: 'in the field', observedOn: '2026-02-14', substrate: 'rotten birch', remarks: '' },
    place: {
      exact: { words: 'third sleeper from the pit', latitude: 51.50735, longitude: -0.12778, uncertaintyM: 12 },
      publicWords: 'a tram depot',
      sensitivity: 'medium',
    },
    visibility: 'public',
    heldUntil: null,
    ...wanted,
  };
}

export async function makeFind(
  browser: Browser,
  imageIds: readonly string[],
  wanted: Partial<Omit<NewFind, 'imageIds'>> = {},
): Promise<FindView> {
  return (await browser.post('/api/finds', newFind(imageIds, wanted)).expect(200)).body as FindView;
}

export async function addTaxon(
  browser: Browser,
  name: string,
  wanted: Partial<{ rank: string; parentId: string | null }> = {},
): Promise<TaxonName> {
  const taxon = { name, authorship: '', rank: 'species', code: 'botanical', parentId: null, ...wanted };
  return (await browser.post('/api/taxa', taxon).expect(200)).body as TaxonName;
}

export async function determine(browser: Browser, findId: string, taxonId: string, qualifier = ''): Promise<FindView> {
  const given = { taxonId, qualifier, reason: 'by the look of it', confidence: 'fairly sure' };
  return (await browser.post(`/api/finds/${findId}/determinations`, given).expect(200)).body as FindView;
}
