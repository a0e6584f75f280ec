import type { Knex } from 'knex';
import type {
  EditObservation,
  FindPicture,
  NewObservation,
  NewPreparation,
  ObservationView,
  PreparationView,
} from '../../shared/contracts/finds.js';
import type { Database } from './database.js';
import { type TileColumns, toTile, withTiles } from './tiles.js';

interface ObservationRow {
  id: string;
  kind: NewObservation['kind'];
  observed_on: string;
  observer_id: string;
  observer_name: string;
  substrate: string;
  remarks: string;
}

interface PreparationRow extends Omit<PreparationView, 'id'> {
  id: string;
  observation_id: string;
}

interface PictureRow extends TileColumns {
  observation_id: string;
  preparation_id: string | null;
  title: string;
  role: FindPicture['role'];
  light: FindPicture['light'];
  credit_line: string;
  licence: FindPicture['licence'];
}

/** Looks at a find, what was prepared in them, and the pictures taken. */
export class ObservationTable {
  constructor(private readonly db: Database) {}

  /** by day, with their preparations and pictures in order */
  async ofFind(findId: string): Promise<ObservationView[]> {
    const observations = (await this.db
      .read('observations')
      .join('users', 'users.id', 'observations.observer_id')
      .where('observations.find_id', findId)
      .orderBy(['observations.observed_on', 'observations.created_at', 'observations.id'])
      .select('observations.*', { observer_name: 'users.name' })) as ObservationRow[];
    const ids = observations.map((observation) => observation.id);
    const preparations = (await this.db
      .read('preparations')
      .whereIn('observation_id', ids)
      .orderBy(['created_at', 'id'])) as PreparationRow[];
    const pictures = await this.pictures(ids);
    return observations.map((row) => ({
      id: row.id,
      kind: row.kind,
      observedOn: row.observed_on,
      observer: { id: row.observer_id, name: row.observer_name },
      substrate: row.substrate,
      remarks: row.remarks,
      preparations: preparations.filter((p) => p.observation_id === row.id).map(toPreparation),
      pictures: pictures.filter((p) => p.observation_id === row.id).map(toPicture),
    }));
  }

  /** the find that an observation is of; null when there is no such observation */
  async findOf(observationId: string, trx: Knex.Transaction): Promise<string | null> {
    const row = (await trx('observations').where({ id: observationId }).first('find_id')) as
      { find_id: string } | undefined;
    return row?.find_id ?? null;
  }

  async insert(
    observation: NewObservation & { id: string; findId: string; observerId: string; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('observations').insert({
      id: observation.id,
      find_id: observation.findId,
      kind: observation.kind,
      observed_on: observation.observedOn,
      observer_id: observation.observerId,
      substrate: observation.substrate,
      remarks: observation.remarks,
      created_at: observation.createdAt,
    });
  }

  async update(id: string, change: EditObservation, trx: Knex.Transaction): Promise<void> {
    const columns = {
      ...(change.kind !== undefined && { kind: change.kind }),
      ...(change.observedOn !== undefined && { observed_on: change.observedOn }),
      ...(change.substrate !== undefined && { substrate: change.substrate }),
      ...(change.remarks !== undefined && { remarks: change.remarks }),
    };
    if (Object.keys(columns).length > 0) await trx('observations').where({ id }).update(columns);
  }

  async insertPreparation(
    preparation: NewPreparation & { id: string; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('preparations').insert({
      id: preparation.id,
      observation_id: preparation.observationId,
      title: preparation.title,
      part: preparation.part,
      medium: preparation.medium,
      stain: preparation.stain,
      condition: preparation.condition,
      created_at: preparation.createdAt,
    });
  }

  /**
   * Puts pictures from the owner's tray into an observation.
   * @returns how many of them were there to be put: own, ready, and in no find
   */
  async takeFromTray(
    imageIds: readonly string[],
    ownerId: string,
    observationId: string,
    trx: Knex.Transaction,
  ): Promise<number> {
    return trx('images')
      .whereIn('id', imageIds)
      .where({ owner_id: ownerId, state: 'ready' })
      .whereNull('observation_id')
      .update({ observation_id: observationId });
  }

  /**
   * Says which preparation pictures show.
   * @returns how many of them belong to the observation and are the owner's
   */
  async putUnder(
    imageIds: readonly string[],
    ownerId: string,
    preparation: { id: string; observationId: string },
    trx: Knex.Transaction,
  ): Promise<number> {
    return trx('images')
      .whereIn('id', imageIds)
      .where({ owner_id: ownerId, observation_id: preparation.observationId })
      .update({ preparation_id: preparation.id });
  }

  private async pictures(observationIds: readonly string[]): Promise<PictureRow[]> {
    const query = this.db
      .read('images')
      .whereIn('images.observation_id', observationIds)
      .where('images.state', 'ready')
      .orderBy(['images.captured_local', 'images.id'])
      .select(
        'images.observation_id',
        'images.preparation_id',
        'images.title',
        'images.role',
        'images.light',
        'images.credit_line',
        'images.licence',
      );
    return (await (withTiles(query) as Knex.QueryBuilder)) as PictureRow[];
  }
}

function toPreparation(row: PreparationRow): PreparationView {
  return {
    id: row.id,
    title: row.title,
    part: row.part,
    medium: row.medium,
    stain: row.stain,
    condition: row.condition,
  };
}

function toPicture(row: PictureRow): FindPicture {
  return {
    ...toTile(row),
    title: row.title,
    role: row.role,
    light: row.light,
    preparationId: row.preparation_id,
    creditLine: row.credit_line,
    licence: row.licence,
  };
}
