import type { Knex } from 'knex';
import type { PersonRef } from '../../shared/contracts/common.js';
import type { ExactPlace, FindRow, PublicPlace } from '../../shared/contracts/finds.js';
import type { Visibility } from '../../shared/permission/can.js';
import type { Sensitivity } from '../../shared/place/generalise.js';
import type { Database } from './database.js';
import { toName } from './gallery.js';
import { type TileColumns, toTile, withTiles } from './tiles.js';

/** A find without what belongs to it. */
export interface Find {
  readonly id: string;
  /** CW-214 */
  readonly number: string;
  readonly owner: PersonRef;
  readonly visibility: Visibility;
  readonly heldUntil: string | null;
  readonly fruitBodies: number;
  readonly standingId: string | null;
  readonly sensitivity: Sensitivity;
  readonly exactPlace: ExactPlace;
  readonly publicPlace: PublicPlace;
  readonly placeReaders: readonly PersonRef[];
}

/** What can be said anew of a find; the standing determination has a way of its own. */
export type FindChange = Partial<
  Pick<Find, 'visibility' | 'heldUntil' | 'fruitBodies' | 'sensitivity' | 'exactPlace' | 'publicPlace'>
>;

interface Row {
  id: string;
  prefix: string;
  number: number;
  owner_id: string;
  owner_name: string;
  visibility: Visibility;
  held_until: string | null;
  fruit_bodies: number;
  standing_id: string | null;
  sensitivity: Sensitivity;
  exact_words: string;
  exact_latitude: number | null;
  exact_longitude: number | null;
  exact_uncertainty_m: number | null;
  public_words: string;
  public_latitude: number | null;
  public_longitude: number | null;
  public_uncertainty_m: number | null;
}

export class FindTable {
  constructor(private readonly db: Database) {}

  async find(id: string, knex: Knex = this.db.read): Promise<Find | null> {
    const row = (await knex('finds')
      .join('users as owner', 'owner.id', 'finds.owner_id')
      .where('finds.id', id)
      .first('finds.*', { owner_name: 'owner.name' })) as Row | undefined;
    if (!row) return null;
    const readers = (await knex('find_place_readers')
      .join('users', 'users.id', 'find_place_readers.user_id')
      .where('find_place_readers.find_id', id)
      .orderBy('users.name')
      .select('users.id', 'users.name')) as PersonRef[];
    return toFind(row, readers);
  }

  /** the desk's list: a person's own finds, newest first */
  async ofOwner(ownerId: string): Promise<FindRow[]> {
    const rows = (await this.db
      .read('finds')
      .leftJoin('determinations', 'determinations.id', 'finds.standing_id')
      .where('finds.owner_id', ownerId)
      .orderBy([
        { column: 'finds.created_at', order: 'desc' },
        { column: 'finds.id', order: 'desc' },
      ])
      .select(
        'finds.*',
        'determinations.name',
        'determinations.authorship',
        'determinations.rank',
        'determinations.code',
        'determinations.qualifier',
        { first_observed_on: this.db.read.raw('(select min(observed_on) from observations where find_id = finds.id)') },
      )) as (Row & Parameters<typeof toName>[0] & { first_observed_on: string | null })[];
    const pictures = await this.picturesOf(rows.map((row) => row.id));
    return rows.map((row) => {
      const own = pictures.get(row.id) ?? [];
      const cover = own.find((picture) => picture.role === 'subject') ?? own[0];
      return {
        id: row.id,
        number: `${row.prefix}-${row.number}`,
        name: toName(row),
        visibility: row.visibility,
        observedOn: row.first_observed_on ?? '',
        publicWords: row.public_words,
        pictures: own.length,
        cover: cover ? toTile(cover) : null,
      };
    });
  }

  async insert(
    find: Required<FindChange> & { id: string; prefix: string; number: number; ownerId: string; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('finds').insert({
      ...toColumns(find),
      id: find.id,
      prefix: find.prefix,
      number: find.number,
      owner_id: find.ownerId,
      created_at: find.createdAt,
    });
  }

  async update(id: string, change: FindChange, trx: Knex.Transaction): Promise<void> {
    const columns = toColumns(change);
    if (Object.keys(columns).length > 0) await trx('finds').where({ id }).update(columns);
  }

  async setStanding(id: string, determinationId: string, trx: Knex.Transaction): Promise<void> {
    await trx('finds').where({ id }).update({ standing_id: determinationId });
  }

  /** the next number of the counter that all finds share */
  async nextNumber(trx: Knex.Transaction): Promise<number> {
    const [row] = (await trx('counters').where({ name: 'find-number' }).increment('value', 1).returning('value')) as {
      value: number;
    }[];
    if (!row) throw new Error('The counter of find numbers is missing.');
    return row.value;
  }

  private async picturesOf(findIds: readonly string[]): Promise<Map<string, (TileColumns & { role: string })[]>> {
    const query = this.db
      .read('images')
      .join('observations', 'observations.id', 'images.observation_id')
      .whereIn('observations.find_id', findIds)
      .where('images.state', 'ready')
      .orderBy(['observations.observed_on', 'images.captured_local', 'images.id'])
      .select('images.role', 'observations.find_id');
    const rows = (await (withTiles(query) as Knex.QueryBuilder)) as (TileColumns & { role: string; find_id: string })[];
    const byFind = new Map<string, (TileColumns & { role: string })[]>();
    for (const row of rows) byFind.set(row.find_id, [...(byFind.get(row.find_id) ?? []), row]);
    return byFind;
  }
}

function toFind(row: Row, placeReaders: readonly PersonRef[]): Find {
  return {
    id: row.id,
    number: `${row.prefix}-${row.number}`,
    owner: { id: row.owner_id, name: row.owner_name },
    visibility: row.visibility,
    heldUntil: row.held_until,
    fruitBodies: row.fruit_bodies,
    standingId: row.standing_id,
    sensitivity: row.sensitivity,
    exactPlace: {
      words: row.exact_words,
      latitude: row.exact_latitude,
      longitude: row.exact_longitude,
      uncertaintyM: row.exact_uncertainty_m,
    },
    publicPlace: {
      words: row.public_words,
      latitude: row.public_latitude,
      longitude: row.public_longitude,
      uncertaintyM: row.public_uncertainty_m,
    },
    placeReaders,
  };
}

function toColumns(change: FindChange): Partial<Row> {
  return {
    ...(change.visibility !== undefined && { visibility: change.visibility }),
    ...(change.heldUntil !== undefined && { held_until: change.heldUntil }),
    ...(change.fruitBodies !== undefined && { fruit_bodies: change.fruitBodies }),
    ...(change.sensitivity !== undefined && { sensitivity: change.sensitivity }),
    ...(change.exactPlace !== undefined && {
      exact_words: change.exactPlace.words,
      exact_latitude: change.exactPlace.latitude,
      exact_longitude: change.exactPlace.longitude,
      exact_uncertainty_m: change.exactPlace.uncertaintyM,
    }),
    ...(change.publicPlace !== undefined && {
      public_words: change.publicPlace.words,
      public_latitude: change.publicPlace.latitude,
      public_longitude: change.publicPlace.longitude,
      public_uncertainty_m: change.publicPlace.uncertaintyM,
    }),
  };
}
