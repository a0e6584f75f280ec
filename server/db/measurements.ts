import type { Knex } from 'knex';
import type { DimensionMeasure } from '../../shared/annotations/measure.js';
import type { NoteGeometry } from '../../shared/annotations/note.js';
import type { Scale } from '../../shared/scale/scale.js';
import { type ScaleColumns, toScale } from './scale-columns.js';

/** A snapshot of what was drawn on one body. */
export interface Measurement {
  readonly id: string;
  readonly seriesId: string;
  readonly noteId: string;
  readonly imageId: string;
  readonly structure: string;
  readonly geometry: NoteGeometry;
}

/** The version of a picture's scale that values are of. */
export interface ScaleVersion {
  /** null while nobody has set one */
  readonly id: string | null;
  /** null where the grounds are none */
  readonly scale: Scale | null;
}

interface Row {
  id: string;
  series_id: string;
  note_id: string;
  image_id: string;
  structure: string;
  geometry: string;
}

/**
 * Snapshots and their values. Nothing is changed or deleted but `superseded_at`, which is set once: what was
 * believed before can always be told.
 */
export class MeasurementTable {
  /** the snapshots of a picture that count now */
  async ofImage(imageId: string, trx: Knex.Transaction): Promise<Measurement[]> {
    const rows = (await trx('measurements')
      .join('series', 'series.id', 'measurements.series_id')
      .where('measurements.image_id', imageId)
      .whereNull('measurements.superseded_at')
      .orderBy('measurements.id')
      .select('measurements.*', 'series.structure')) as Row[];
    return rows.map((row) => ({
      id: row.id,
      seriesId: row.series_id,
      noteId: row.note_id,
      imageId: row.image_id,
      structure: row.structure,
      geometry: JSON.parse(row.geometry) as NoteGeometry,
    }));
  }

  async insert(
    measurement: Omit<Measurement, 'structure'> & { createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('measurements').insert({
      id: measurement.id,
      series_id: measurement.seriesId,
      note_id: measurement.noteId,
      image_id: measurement.imageId,
      geometry: JSON.stringify(measurement.geometry),
      created_at: measurement.createdAt,
    });
  }

  async insertValue(
    value: DimensionMeasure & { id: string; measurementId: string; imageScaleId: string | null; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('measurement_values').insert({
      id: value.id,
      measurement_id: value.measurementId,
      image_scale_id: value.imageScaleId,
      dimension: value.dimension,
      px: value.px,
      um: value.um,
      u: value.u,
      created_at: value.createdAt,
    });
  }

  /** the note was drawn anew or removed: its snapshot and values count no more */
  async supersedeNote(noteId: string, at: string, trx: Knex.Transaction): Promise<void> {
    const current = (await trx('measurements')
      .where({ note_id: noteId })
      .whereNull('superseded_at')
      .pluck('id')) as string[];
    await trx('measurements').whereIn('id', current).update({ superseded_at: at });
    for (const id of current) await this.supersedeValues(id, at, trx);
  }

  /** the picture's scale is another: the snapshot stays, its values count no more */
  async supersedeValues(measurementId: string, at: string, trx: Knex.Transaction): Promise<void> {
    await trx('measurement_values')
      .where({ measurement_id: measurementId })
      .whereNull('superseded_at')
      .update({ superseded_at: at });
  }

  async currentScale(imageId: string, trx: Knex.Transaction): Promise<ScaleVersion> {
    const row = (await trx('images')
      .join('image_scales', 'image_scales.id', 'images.current_scale_id')
      .where('images.id', imageId)
      .first('image_scales.*')) as (ScaleColumns & { id: string }) | undefined;
    return row ? { id: row.id, scale: toScale(row) } : { id: null, scale: null };
  }
}
