import type { Knex } from 'knex';
import { measureNote } from '../../shared/annotations/measure.js';
import type { Note } from '../../shared/annotations/note.js';
import { structureOf } from '../../shared/annotations/structures.js';
import { type Clock, instant } from '../clock.js';
import type { Measurement, MeasurementTable, ScaleVersion } from '../db/measurements.js';
import { newId } from '../ids.js';

/** Turns what is drawn on bodies into values, and keeps those that were believed before. */
export class MeasurementService {
  constructor(
    private readonly measurements: MeasurementTable,
    private readonly clock: Clock,
  ) {}

  /**
   * A body was drawn, or drawn anew.
   * @throws {DomainError} `wrong-shape` when the drawing doesn't fit the structure's way; `not-finite`
   */
  async draw(note: Note & { seriesId: string }, structure: string, trx: Knex.Transaction): Promise<void> {
    await this.measurements.supersedeNote(note.id, instant(this.clock), trx);
    const measurement: Measurement = {
      id: newId(),
      seriesId: note.seriesId,
      noteId: note.id,
      imageId: note.imageId,
      structure,
      geometry: note.geometry,
    };
    await this.measurements.insert({ ...measurement, createdAt: instant(this.clock) }, trx);
    await this.value(measurement, await this.measurements.currentScale(note.imageId, trx), trx);
  }

  async remove(noteId: string, trx: Knex.Transaction): Promise<void> {
    await this.measurements.supersedeNote(noteId, instant(this.clock), trx);
  }

  /**
   * A picture's scale is another: all that is measured on it gets new values, in the transaction that set the
   * scale. The old values stay, superseded, each with the version of the scale that it came from.
   */
  async recompute(imageId: string, trx: Knex.Transaction): Promise<void> {
    const version = await this.measurements.currentScale(imageId, trx);
    for (const measurement of await this.measurements.ofImage(imageId, trx)) {
      await this.measurements.supersedeValues(measurement.id, instant(this.clock), trx);
      await this.value(measurement, version, trx);
    }
  }

  private async value(measurement: Measurement, version: ScaleVersion, trx: Knex.Transaction): Promise<void> {
    const way = structureOf(measurement.structure)?.way;
    if (!way) throw new Error(`A series measures ${measurement.structure}, which is no structure.`);
    for (const dimension of measureNote(measurement.geometry, way, version.scale).dimensions) {
      await this.measurements.insertValue(
        {
          ...dimension,
          id: newId(),
          measurementId: measurement.id,
          imageScaleId: version.id,
          createdAt: instant(this.clock),
        },
        trx,
      );
    }
  }
}
