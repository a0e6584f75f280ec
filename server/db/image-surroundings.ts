import type { ImageView } from '../../shared/contracts/images.js';
import type { NameView } from '../../shared/contracts/common.js';
import type { Database } from './database.js';
import type { Image } from './images.js';

/** What stands around a picture: whose it is, its find and name, its preparation, its optics. */
export interface ImageSurroundings {
  readonly owner: ImageView['owner'];
  readonly find: ImageView['find'];
  readonly preparation: ImageView['preparation'];
  readonly numericalAperture: number | null;
}

interface FindColumns {
  id: string;
  prefix: string;
  number: number;
  fruit_bodies: number;
  name: string | null;
  authorship: string;
  rank: string;
  code: NameView['code'];
  qualifier: string;
}

export class ImageSurroundingsTable {
  constructor(private readonly db: Database) {}

  async of(image: Image): Promise<ImageSurroundings> {
    const { read } = this.db;
    const owner = (await read('users').where({ id: image.ownerId }).first('id', 'name')) as ImageView['owner'];
    const preparation = (await read('preparations').where({ id: image.preparationId }).first('id', 'title')) as
      { id: string; title: string } | undefined;
    const setting = (await read('settings').where({ id: image.settingId }).first('numerical_aperture')) as
      { numerical_aperture: number | null } | undefined;
    return {
      owner,
      find: image.observationId === null ? null : await this.find(image.observationId),
      preparation: preparation ?? null,
      numericalAperture: setting?.numerical_aperture ?? null,
    };
  }

  /** the observation that a preparation belongs to; null when there is none */
  async observationOf(preparationId: string): Promise<string | null> {
    const row = (await this.db.read('preparations').where({ id: preparationId }).first('observation_id')) as
      { observation_id: string } | undefined;
    return row?.observation_id ?? null;
  }

  private async find(observationId: string): Promise<ImageView['find']> {
    const row = (await this.db
      .read('observations')
      .join('finds', 'finds.id', 'observations.find_id')
      .leftJoin('determinations', 'determinations.id', 'finds.standing_id')
      .where('observations.id', observationId)
      .select('finds.id', 'finds.prefix', 'finds.number', 'finds.fruit_bodies')
      .select(
        'determinations.name',
        'determinations.authorship',
        'determinations.rank',
        'determinations.code',
        'determinations.qualifier',
      )
      .first()) as FindColumns;
    const { name, authorship, rank, code, qualifier } = row;
    return {
      id: row.id,
      number: `${row.prefix}-${row.number}`,
      fruitBodies: row.fruit_bodies,
      name: name === null ? null : { name, authorship, rank, code, qualifier },
    };
  }
}
