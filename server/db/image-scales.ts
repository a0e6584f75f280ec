import type { Knex } from 'knex';
import type { ScaleProvenance, ScaleView } from '../../shared/contracts/scales.js';
import type { Grounds, Scale } from '../../shared/scale/scale.js';
import type { Database } from './database.js';
import { type ScaleColumns, toScale } from './scale-columns.js';

/** One version of a picture's scale. Rows are only ever added: the newest counts, the others are its history. */
export interface ImageScale {
  readonly id: string;
  readonly imageId: string;
  /** null when the grounds are `none` */
  readonly scale: Scale | null;
  readonly calibrationId: string | null;
  readonly provenance: ScaleProvenance;
  readonly setBy: string;
  readonly setAt: string;
}

interface Row extends ScaleColumns {
  id: string;
  image_id: string;
  grounds: Grounds;
  calibration_id: string | null;
  provenance: string;
  set_by: string;
  set_at: string;
}

export class ImageScaleTable {
  constructor(private readonly db: Database) {}

  async insert(scale: ImageScale, trx: Knex.Transaction): Promise<void> {
    await trx<Row>('image_scales').insert({
      id: scale.id,
      image_id: scale.imageId,
      grounds: scale.scale?.grounds ?? 'none',
      um_per_px_x: scale.scale?.umPerPxX ?? null,
      um_per_px_y: scale.scale?.umPerPxY ?? null,
      relative_uncertainty: scale.scale?.relativeUncertainty ?? null,
      calibration_id: scale.calibrationId,
      provenance: JSON.stringify(scale.provenance),
      set_by: scale.setBy,
      set_at: scale.setAt,
    });
  }

  async find(id: string, knex: Knex = this.db.read): Promise<ImageScale | null> {
    const row = await knex<Row>('image_scales').where({ id }).first();
    return row ? toImageScale(row) : null;
  }

  /** all versions of a picture's scale, newest first, as the API shows them */
  async views(imageId: string): Promise<ScaleView[]> {
    const rows = (await this.db
      .read('image_scales')
      .join('users', 'users.id', 'image_scales.set_by')
      .where('image_scales.image_id', imageId)
      .orderBy('image_scales.id', 'desc')
      .select('image_scales.*', { setter: 'users.name' })) as (Row & { setter: string })[];
    return rows.map((row) => ({
      id: row.id,
      grounds: row.grounds,
      umPerPxX: row.um_per_px_x,
      umPerPxY: row.um_per_px_y,
      relativeUncertainty: row.relative_uncertainty,
      provenance: JSON.parse(row.provenance) as ScaleProvenance,
      setBy: { id: row.set_by, name: row.setter },
      setAt: row.set_at,
    }));
  }
}

function toImageScale(row: Row): ImageScale {
  return {
    id: row.id,
    imageId: row.image_id,
    scale: toScale(row),
    calibrationId: row.calibration_id,
    provenance: JSON.parse(row.provenance) as ScaleProvenance,
    setBy: row.set_by,
    setAt: row.set_at,
  };
}
