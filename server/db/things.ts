import type { Knex } from 'knex';
import type { FindThing, Thing, Visibility } from '../../shared/permission/can.js';

interface FindColumns {
  find_id: string;
  owner_id: string;
  visibility: Visibility;
  held_until: string | null;
}

/** Loads what a permission is asked about. */
export class ThingTable {
  constructor(private readonly knex: Knex) {}

  /** null when there is no such thing */
  async load(kind: Thing['kind'], id: string | null): Promise<Thing | null> {
    if (kind === 'site') return { kind: 'site' };
    if (id === null) throw new Error(`A route on a ${kind} needs the parameter that names it.`);
    switch (kind) {
      case 'find':
        return this.find(id);
      case 'image':
        return this.image(id);
      case 'series':
        return this.series(id);
      case 'rig':
        return this.rig(id);
    }
  }

  async find(id: string): Promise<FindThing | null> {
    const row = await this.knex<FindColumns>('finds').select(findColumns(this.knex)).where('finds.id', id).first();
    return row ? this.toFind(row as FindColumns) : null;
  }

  private async image(id: string): Promise<Thing | null> {
    const row = (await this.knex('images')
      .leftJoin('observations', 'observations.id', 'images.observation_id')
      .leftJoin('finds', 'finds.id', 'observations.find_id')
      .select(findColumns(this.knex))
      .select({ image_owner: 'images.owner_id' })
      .where('images.id', id)
      .first()) as (FindColumns & { image_owner: string; find_id: string | null }) | undefined;
    if (!row) return null;
    return { kind: 'image', ownerId: row.image_owner, find: row.find_id === null ? null : await this.toFind(row) };
  }

  private async series(id: string): Promise<Thing | null> {
    const row = (await this.knex('series')
      .join('finds', 'finds.id', 'series.find_id')
      .select(findColumns(this.knex))
      .select('series.observer_id')
      .where('series.id', id)
      .first()) as (FindColumns & { observer_id: string }) | undefined;
    return row ? { kind: 'series', observerId: row.observer_id, find: await this.toFind(row) } : null;
  }

  private async rig(id: string): Promise<Thing | null> {
    const row = (await this.knex('rigs').select('owner_id').where({ id }).first()) as { owner_id: string } | undefined;
    return row ? { kind: 'rig', ownerId: row.owner_id } : null;
  }

  private async toFind(row: FindColumns): Promise<FindThing> {
    const readers = (await this.knex('find_place_readers').where('find_id', row.find_id).pluck('user_id')) as string[];
    return {
      kind: 'find',
      ownerId: row.owner_id,
      visibility: row.visibility,
      heldUntil: row.held_until,
      placeReaders: readers,
    };
  }
}

function findColumns(knex: Knex): Record<string, Knex.Raw> {
  return {
    find_id: knex.raw('finds.id'),
    owner_id: knex.raw('finds.owner_id'),
    visibility: knex.raw('finds.visibility'),
    held_until: knex.raw('finds.held_until'),
  };
}
