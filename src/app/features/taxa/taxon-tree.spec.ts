import type { TaxonName } from '@shared/contracts/taxa';
import { taxonTree, type TaxonNode } from './taxon-tree';

const taxon = (id: string, name: string, parentId: string | null, change: Partial<TaxonName> = {}): TaxonName => ({
  id,
  name,
  authorship: '',
  rank: 'genus',
  code: 'botanical',
  acceptedId: null,
  parentId,
  pictures: 0,
  ...change,
});
const outline = (nodes: readonly TaxonNode[]): unknown[] => nodes.map((node) => [node.name.name, outline(node.below)]);

describe('taxonTree', () => {
  it('puts each name below its parent, in order of name', () => {
    const names = [taxon('t', 'Trichia', 'f'), taxon('f', 'Trichiaceae', null), taxon('h', 'Hemitrichia', 'f')];
    expect(outline(taxonTree(names))).toEqual([
      [
        'Trichiaceae',
        [
          ['Hemitrichia', []],
          ['Trichia', []],
        ],
      ],
    ]);
  });

  it('leaves synonyms out', () => {
    const names = [taxon('a', 'Arcyria', null), taxon('s', 'Nassula', null, { acceptedId: 'a' })];
    expect(outline(taxonTree(names))).toEqual([['Arcyria', []]]);
  });

  it('shows a name whose parent is missing at the top', () => {
    expect(outline(taxonTree([taxon('a', 'Arcyria', 'gone')]))).toEqual([['Arcyria', []]]);
  });

  it('neither hangs on nor hides names that are each other’s parents', () => {
    const names = [taxon('a', 'Arcyria', 'b'), taxon('b', 'Badhamia', 'a')];
    expect(outline(taxonTree(names))).toEqual([['Arcyria', [['Badhamia', []]]]]);
  });
});
