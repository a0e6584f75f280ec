import type { Knex } from 'knex';
import type { NameView } from '../../shared/contracts/common.js';
import type { NewTaxon, RANKS } from '../../shared/contracts/taxa.js';
import type { Database } from './database.js';

export type Rank = (typeof RANKS)[number];

/** A name of the list: accepted, or a synonym of an accepted one. */
export interface Taxon {
  readonly id: string;
  readonly name: string;
  readonly authorship: string;
  readonly rank: Rank;
  readonly code: NameView['code'];
  readonly parentId: string | null;
  /** set for a synonym */
  readonly acceptedId: string | null;
}

interface Row {
  id: string;
  name: string;
  authorship: string;
  rank: Rank;
  code: NameView['code'];
  parent_id: string | null;
  accepted_id: string | null;
  created_by: string | null;
  created_at: string;
}

export class TaxonTable {
  constructor(private readonly db: Database) {}

  async find(id: string, knex: Knex = this.db.read): Promise<Taxon | null> {
    const row = await knex<Row>('taxa').where({ id }).first();
    return row ? toTaxon(row) : null;
  }

  /** all names, by name */
  async list(): Promise<Taxon[]> {
    return (await this.db.read<Row>('taxa').orderBy(['name', 'id'])).map(toTaxon);
  }

  /** from the highest down to the parent */
  async above(taxon: Taxon): Promise<Taxon[]> {
    const rows = (await this.db.read.raw(
      `with recursive up(id, depth) as (
         select ?, 1 union all
         select taxa.parent_id, up.depth + 1 from up join taxa on taxa.id = up.id where taxa.parent_id is not null
       )
       select taxa.* from up join taxa on taxa.id = up.id order by up.depth desc`,
      [taxon.parentId],
    )) as Row[];
    return rows.map(toTaxon);
  }

  /** the accepted names directly below */
  async below(id: string): Promise<Taxon[]> {
    const rows = await this.db.read<Row>('taxa').where({ parent_id: id }).whereNull('accepted_id').orderBy('name');
    return rows.map(toTaxon);
  }

  async synonyms(acceptedId: string): Promise<Taxon[]> {
    const rows = await this.db.read<Row>('taxa').where({ accepted_id: acceptedId }).orderBy('name');
    return rows.map(toTaxon);
  }

  /** a name of this code that reads the same, whatever its authorship; null when there is none */
  async sameName(name: string, code: NameView['code'], trx: Knex.Transaction): Promise<Taxon | null> {
    const row = await trx<Row>('taxa').whereRaw('name = ? collate nocase', [name]).where({ code }).first();
    return row ? toTaxon(row) : null;
  }

  async insert(
    taxon: NewTaxon & { id: string; createdBy: string | null; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx<Row>('taxa').insert({
      id: taxon.id,
      name: taxon.name,
      authorship: taxon.authorship,
      rank: taxon.rank,
      code: taxon.code,
      parent_id: taxon.parentId,
      accepted_id: null,
      created_by: taxon.createdBy,
      created_at: taxon.createdAt,
    });
  }
}

/** The name of a taxon as it stands by itself, without a qualifier. */
export function nameOf(taxon: Taxon): NameView {
  return { name: taxon.name, authorship: taxon.authorship, rank: taxon.rank, code: taxon.code, qualifier: '' };
}

function toTaxon(row: Row): Taxon {
  return {
    id: row.id,
    name: row.name,
    authorship: row.authorship,
    rank: row.rank,
    code: row.code,
    parentId: row.parent_id,
    acceptedId: row.accepted_id,
  };
}
