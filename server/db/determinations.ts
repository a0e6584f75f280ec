import type { Knex } from 'knex';
import type { DeterminationView, NewDetermination } from '../../shared/contracts/finds.js';
import type { Database } from './database.js';
import type { Taxon } from './taxa.js';

type Determination = Omit<DeterminationView, 'stands'>;

interface Row {
  id: string;
  taxon_id: string;
  name: string;
  authorship: string;
  rank: string;
  code: 'botanical' | 'zoological';
  qualifier: string;
  reason: string;
  confidence: DeterminationView['confidence'];
  by_id: string;
  by_name: string;
  determined_at: string;
}

/** Names given to finds. Rows stay as they were given; which one stands is the find's. */
export class DeterminationTable {
  constructor(private readonly db: Database) {}

  /** all of a find, newest first */
  async ofFind(findId: string): Promise<Determination[]> {
    const rows = (await this.db
      .read('determinations')
      .join('users', 'users.id', 'determinations.by_id')
      .where('determinations.find_id', findId)
      .orderBy([
        { column: 'determinations.determined_at', order: 'desc' },
        { column: 'determinations.id', order: 'desc' },
      ])
      .select('determinations.*', { by_name: 'users.name' })) as Row[];
    return rows.map(toDetermination);
  }

  /** whether the find has this determination */
  async belongs(id: string, findId: string, trx: Knex.Transaction): Promise<boolean> {
    return (await trx('determinations').where({ id, find_id: findId }).first('id')) !== undefined;
  }

  async insert(
    determination: NewDetermination & { id: string; findId: string; byId: string; determinedAt: string; taxon: Taxon },
    trx: Knex.Transaction,
  ): Promise<void> {
    const { taxon } = determination;
    await trx('determinations').insert({
      id: determination.id,
      find_id: determination.findId,
      taxon_id: taxon.id,
      name: taxon.name,
      authorship: taxon.authorship,
      rank: taxon.rank,
      code: taxon.code,
      qualifier: determination.qualifier,
      reason: determination.reason,
      confidence: determination.confidence,
      by_id: determination.byId,
      determined_at: determination.determinedAt,
    });
  }
}

function toDetermination(row: Row): Determination {
  return {
    id: row.id,
    taxonId: row.taxon_id,
    name: {
      name: row.name,
      authorship: row.authorship,
      rank: row.rank,
      code: row.code,
      qualifier: row.qualifier,
    },
    reason: row.reason,
    confidence: row.confidence,
    by: { id: row.by_id, name: row.by_name },
    determinedAt: row.determined_at,
  };
}
