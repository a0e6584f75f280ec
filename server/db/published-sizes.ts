import type { Knex } from 'knex';
import type { PublishedSizeView } from '../../shared/contracts/finds.js';
import type { Database } from './database.js';

interface Row {
  id: string;
  taxon_id: string;
  structure: string;
  dimension: 'length' | 'width';
  min_um: number;
  max_um: number;
  source: string;
  year: number | null;
  page: string;
  seen: number;
}

/** A printed size as it is brought in; what the book leaves unsaid is null. */
export interface NewPublishedSize extends Omit<PublishedSizeView, 'taxonName'> {
  readonly kind: string | null;
  readonly n: number | null;
  readonly medium: string | null;
  readonly ornament: string | null;
}

/** What books say of sizes. */
export class PublishedSizeTable {
  constructor(private readonly db: Database) {}

  /**
   * Of these taxa, of the names that they are synonyms of, and of the synonyms of either: a book that used
   * an older name still measured the same thing.
   */
  async ofTaxa(taxonIds: readonly string[]): Promise<PublishedSizeView[]> {
    if (taxonIds.length === 0) return [];
    const accepted = this.db.read('taxa').whereIn('id', taxonIds).select(this.db.read.raw('coalesce(accepted_id, id)'));
    const rows = (await this.db
      .read('published_sizes')
      .join('taxa', 'taxa.id', 'published_sizes.taxon_id')
      .where((either) => either.whereIn('taxa.id', accepted.clone()).orWhereIn('taxa.accepted_id', accepted.clone()))
      .orderBy([
        'taxa.name',
        'published_sizes.structure',
        'published_sizes.dimension',
        'published_sizes.year',
        'published_sizes.id',
      ])
      .select('published_sizes.*', { taxon_name: 'taxa.name' })) as (Row & { taxon_name: string })[];
    return rows.map((row) => ({
      id: row.id,
      taxonId: row.taxon_id,
      taxonName: row.taxon_name,
      structure: row.structure,
      dimension: row.dimension,
      minUm: row.min_um,
      maxUm: row.max_um,
      source: row.source,
      year: row.year,
      page: row.page,
      seen: Boolean(row.seen),
    }));
  }

  async insert(size: NewPublishedSize, trx: Knex.Transaction): Promise<void> {
    await trx('published_sizes').insert({
      id: size.id,
      taxon_id: size.taxonId,
      structure: size.structure,
      dimension: size.dimension,
      min_um: size.minUm,
      max_um: size.maxUm,
      kind: size.kind,
      n: size.n,
      medium: size.medium,
      ornament: size.ornament,
      source: size.source,
      year: size.year,
      page: size.page,
      seen: size.seen,
    });
  }
}
