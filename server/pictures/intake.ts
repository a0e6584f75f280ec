import type { Knex } from 'knex';
import { rm } from 'node:fs/promises';
import type { ImageTable } from '../db/images.js';
import type { Job } from '../db/jobs.js';
import { failPoint } from '../fail-points.js';
import { NO_NOTES } from './capture-notes.js';
import { type ChildLimits, runInChild } from './child-process.js';
import type { PictureFiles } from './picture-files.js';

/**
 * Takes a picture in: reads what it is and makes what pages show of it, in a process of its own. May be cut
 * off anywhere and begun again: what is half-made lies aside, and the picture is shown only once all is there.
 */
export class Intake {
  constructor(
    private readonly images: ImageTable,
    private readonly files: PictureFiles,
    private readonly settings: { readonly maxPixels: number; readonly limits: ChildLimits },
  ) {}

  readonly run = async ({ about: id }: Job, signal: AbortSignal): Promise<void> => {
    const image = await this.images.find(id);
    // one that was given up is begun again when the keeper retries its job
    const refused = image?.state === 'refused' && image.refusal?.code !== 'intake-failed';
    if (!image || image.state === 'ready' || refused) return;
    await this.images.setWorking(id);
    failPoint('intake:begun');
    const folder = await this.files.making();
    try {
      const source = this.files.original(image.sha256);
      const { maxPixels, limits } = this.settings;
      const answer = await runInChild({ task: 'intake', source, folder, maxPixels }, limits, signal);
      if (answer.done === 'refused') {
        await this.images.setRefused(id, answer.refusal);
        return;
      }
      if (answer.done !== 'intake') throw new Error(`Asked for an intake, got a ${answer.done}.`);
      failPoint('intake:made');
      await this.files.putInPlace(folder, image);
      failPoint('intake:renamed');
      const kept = await this.images.setTaken(id, { ...answer.facts, ...(answer.facts.notes ?? NO_NOTES) });
      if (!kept) await this.files.forgetMade(id); // discarded meanwhile
      failPoint('intake:recorded');
    } finally {
      await rm(folder, { recursive: true, force: true });
    }
  };

  /** After the last attempt: the picture says that it failed, and can be tried again. */
  readonly givenUp = async (trx: Knex, { about: id }: Job): Promise<void> => {
    await this.images.setRefused(id, { code: 'intake-failed', parameters: {} }, trx);
  };
}
