import type { Clock } from '../server/clock.js';
import type { Database } from '../server/db/database.js';
import { PublishedSizeTable } from '../server/db/published-sizes.js';
import { TaxonTable } from '../server/db/taxa.js';
import { newId } from '../server/ids.js';
import type { NewTaxon } from '../shared/contracts/taxa.js';
import { type PrintedSize, readPrintedSizes } from './taxa/published-sizes.js';
import { treeNames } from './taxa/tree.js';

/** A species of the demo that no size is printed of here. */
const WITHOUT_SIZES: readonly Pick<PrintedSize, 'species' | 'author' | 'family'>[] = [
  { species: 'Polydesmus angustus', author: 'Latzel, 1884', family: 'Polydesmidae' },
  { species: 'Discus rotundatus', author: '(O. F. Müller, 1774)', family: 'Discidae' },
];

/** Names from kingdoms to species, and what books say of their sizes, in one transaction. */
export async function fillTaxa(db: Database, csv: string, clock: Clock): Promise<void> {
  const sizes = readPrintedSizes(csv);
  const taxa = new TaxonTable(db);
  const table = new PublishedSizeTable(db);
  const ids = new Map<string, string>();
  await db.write.transaction(async (trx) => {
    const add = async (taxon: Omit<NewTaxon, 'parentId'>, parent: string | null): Promise<void> => {
      if (ids.has(taxon.name)) return;
      const parentId = parent === null ? null : (ids.get(parent) ?? missing(parent));
      const id = newId();
      ids.set(taxon.name, id);
      await taxa.insert({ ...taxon, id, parentId, createdBy: null, createdAt: clock.now().toISOString() }, trx);
    };
    const codes = new Map<string, NewTaxon['code']>();
    for (const { name, rank, code, parent } of treeNames()) {
      codes.set(name, code);
      await add({ name, authorship: '', rank, code }, parent);
    }
    for (const { species, author, family } of [...sizes, ...WITHOUT_SIZES]) {
      const code = codes.get(family) ?? missing(family);
      const genus = species.split(' ')[0] as string;
      await add({ name: genus, authorship: '', rank: 'genus', code }, family);
      await add({ name: species, authorship: author, rank: 'species', code }, genus);
    }
    for (const size of sizes) {
      const taxonId = ids.get(size.species) ?? missing(size.species);
      // the books leave these unsaid, or the list that they came by does
      const unsaid = { kind: null, n: null, medium: null, ornament: null };
      await table.insert({ ...size, ...unsaid, id: newId(), taxonId }, trx);
    }
  });
}

function missing(name: string): never {
  throw new Error(`${name} stands nowhere in the demo's tree.`);
}
