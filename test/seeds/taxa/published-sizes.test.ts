import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { readPrintedSizes } from '../../../seeds/taxa/published-sizes.js';
import { treeNames } from '../../../seeds/taxa/tree.js';

const FILE = fileURLToPath(new URL('../../../seeds/taxa/published-sizes.csv', import.meta.url));

describe('the published sizes of the demo', () => {
  const sizes = readPrintedSizes(readFileSync(FILE, 'utf8'));

  it('are read with their source, year and page', () => {
    // Macbride 1922, p. 270: Trichia varia, spores 12–14 µm
    expect(sizes.find(({ species, structure }) => species === 'Trichia varia' && structure === 'spore')).toMatchObject({
      dimension: 'length',
      minUm: 12,
      maxUm: 14,
      year: 1922,
      page: '270',
      seen: true,
    });
  });

  it('keep an author with commas whole', () => {
    expect(sizes.find(({ species }) => species === 'Lamproderma retirugisporum')?.author).toContain('Illana');
  });

  it('were all seen where they were printed', () => {
    expect(sizes.length).toBeGreaterThan(190);
    expect(sizes.every(({ seen, source }) => seen && source !== '')).toBe(true);
  });

  it('are of families that stand in the tree', () => {
    const families = new Set(
      treeNames()
        .filter(({ rank }) => rank === 'family')
        .map(({ name }) => name),
    );
    expect(sizes.filter(({ family }) => !families.has(family))).toEqual([]);
  });

  it('refuse a size that is no number', () => {
    const header = 'taxon,author,rank,family,character,min_um,max_um,source,page,seen_or_memory';
    expect(() => readPrintedSizes(`${header}\nA b,C,species,D,spore length,9,x,S 1900,1,seen`)).toThrow('9–x');
    expect(() => readPrintedSizes(`${header}\nA b,C,species,D,spore length,9,8,S 1900,1,seen`)).toThrow('9–8');
  });
});

describe('the tree of the demo', () => {
  it('has each name once, below a name that came before it', () => {
    const seen = new Set<string>();
    for (const { name, parent } of treeNames()) {
      expect(seen.has(name)).toBe(false);
      expect(parent === null || seen.has(parent)).toBe(true);
      seen.add(name);
    }
  });
});
