import type { NameView } from '@shared/contracts/common';
import type { TaxonName } from '@shared/contracts/taxa';

export interface TaxonNode {
  readonly id: string;
  readonly name: NameView;
  readonly rank: string;
  readonly pictures: number;
  readonly below: readonly TaxonNode[];
}

/**
 * The names in use as a tree, each branch by name; synonyms have no place of their own in it.
 * A name whose parent is not in the list stands at the top rather than vanish, and so does one that a
 * circle of parents would hide.
 */
export function taxonTree(names: readonly TaxonName[]): TaxonNode[] {
  const used = names.filter((taxon) => taxon.acceptedId === null).toSorted((a, b) => a.name.localeCompare(b.name));
  const ids = new Set(used.map((taxon) => taxon.id));
  const below = new Map<string | null, TaxonName[]>();
  for (const taxon of used) {
    const parent = taxon.parentId !== null && ids.has(taxon.parentId) ? taxon.parentId : null;
    below.set(parent, [...(below.get(parent) ?? []), taxon]);
  }
  const reached = new Set<string>();
  const toNode = (taxon: TaxonName): TaxonNode => {
    reached.add(taxon.id);
    const { id, name, authorship, rank, code, pictures } = taxon;
    const children = (below.get(id) ?? []).filter((child) => !reached.has(child.id));
    return { id, name: { name, authorship, rank, code, qualifier: '' }, rank, pictures, below: children.map(toNode) };
  };
  const top = (below.get(null) ?? []).map(toNode);
  return [...top, ...used.flatMap((taxon) => (reached.has(taxon.id) ? [] : [toNode(taxon)]))];
}
