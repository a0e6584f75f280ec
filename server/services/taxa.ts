import { type NewTaxon, RANKS, type TaxonName, type TaxonView } from '../../shared/contracts/taxa.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { PublishedSizeTable } from '../db/published-sizes.js';
import { nameOf, type Taxon, type TaxonTable } from '../db/taxa.js';
import { newId } from '../ids.js';
import { Conflict, Invalid, NotFound } from '../problem.js';
import type { GalleryService } from './gallery.js';

/** Pictures on the page of a taxon; the gallery has the rest. */
const PICTURES_ON_PAGE = 24;

/** The list of names. */
export class TaxonService {
  constructor(
    private readonly db: Database,
    private readonly taxa: TaxonTable,
    private readonly sizes: PublishedSizeTable,
    private readonly gallery: GalleryService,
    private readonly clock: Clock,
  ) {}

  async names(): Promise<TaxonName[]> {
    const taxa = await this.taxa.list();
    const pictures = totals(taxa, await this.gallery.picturesByTaxon());
    return taxa.map((taxon) => toTaxonName(taxon, pictures));
  }

  async read(id: string): Promise<TaxonView> {
    const taxon = await this.taxa.find(id);
    if (!taxon) throw new NotFound('taxon');
    const all = await this.taxa.list();
    const pictures = totals(all, await this.gallery.picturesByTaxon());
    const accepted = taxon.acceptedId === null ? null : await this.taxa.find(taxon.acceptedId);
    return {
      id,
      name: nameOf(taxon),
      above: (await this.taxa.above(taxon)).map(toRef),
      below: (await this.taxa.below(id)).map((below) => ({ ...toRef(below), pictures: pictures.get(below.id) ?? 0 })),
      synonyms: (await this.taxa.synonyms(id)).map(nameOf),
      accepted: accepted && toRef(accepted),
      publishedSizes: await this.sizes.ofTaxa([id]),
      pictures: await this.gallery.ofTaxon(id, PICTURES_ON_PAGE),
    };
  }

  /**
   * @throws {Conflict} `name-exists` when a name of the same code reads the same, whatever its authorship:
   *   two spellings of an author must not make two taxa. The parameters name the one that exists.
   * @throws {Invalid} a parent that is unknown, a synonym, or of a rank that is not above
   */
  async add(createdBy: string, taxon: NewTaxon): Promise<TaxonName> {
    const id = newId();
    await this.db.write.transaction(async (trx) => {
      if (taxon.parentId !== null) requireParent(taxon, await this.taxa.find(taxon.parentId, trx));
      const same = await this.taxa.sameName(taxon.name, taxon.code, trx);
      if (same) {
        throw new Conflict('name-exists', `${same.name} is in the list already.`, {
          name: same.name,
          taxonId: same.id,
        });
      }
      await this.taxa.insert({ ...taxon, id, createdBy, createdAt: instant(this.clock) }, trx);
    });
    return toTaxonName({ ...taxon, id, acceptedId: null }, new Map());
  }
}

function requireParent(taxon: NewTaxon, parent: Taxon | null): void {
  const fault = (code: string, detail: string): Invalid => new Invalid([{ pointer: '#/parentId', code, detail }]);
  if (!parent) throw fault('no-such-taxon', 'No taxon has this id.');
  if (parent.acceptedId !== null) throw fault('is-a-synonym', `${parent.name} is a synonym.`);
  if (RANKS.indexOf(parent.rank) >= RANKS.indexOf(taxon.rank)) {
    throw fault('rank-not-above', `A ${parent.rank} can't stand above a ${taxon.rank}.`);
  }
}

/**
 * Pictures of each taxon and everything below it, from those of each taxon alone. Synonyms have the number
 * of what they stand for.
 */
function totals(taxa: readonly Taxon[], own: ReadonlyMap<string | null, number>): Map<string, number> {
  const byId = new Map(taxa.map((taxon) => [taxon.id, taxon]));
  const acceptedOf = (id: string): string => byId.get(id)?.acceptedId ?? id;
  const all = new Map<string, number>();
  for (const [taxonId, pictures] of own) {
    const path = new Set<string>(); // also ends a circle, should the list ever hold one
    let at = taxonId === null ? null : acceptedOf(taxonId);
    while (at !== null && !path.has(at)) {
      path.add(at);
      all.set(at, (all.get(at) ?? 0) + pictures);
      const parent: string | null = byId.get(at)?.parentId ?? null;
      at = parent === null ? null : acceptedOf(parent);
    }
  }
  return new Map(taxa.map((taxon) => [taxon.id, all.get(acceptedOf(taxon.id)) ?? 0]));
}

function toTaxonName(taxon: Taxon, pictures: ReadonlyMap<string, number>): TaxonName {
  return {
    id: taxon.id,
    name: taxon.name,
    authorship: taxon.authorship,
    rank: taxon.rank,
    code: taxon.code,
    acceptedId: taxon.acceptedId,
    parentId: taxon.parentId,
    pictures: pictures.get(taxon.id) ?? 0,
  };
}

function toRef(taxon: Taxon): { id: string; name: ReturnType<typeof nameOf> } {
  return { id: taxon.id, name: nameOf(taxon) };
}
