import type { TrayPicture } from '../../shared/contracts/images.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { ImageScaleTable } from '../db/image-scales.js';
import { type Image, type ImageTable, isReady } from '../db/images.js';
import type { JobTable } from '../db/jobs.js';
import { Conflict, NotFound } from '../problem.js';
import { toImageTile } from './image-tile.js';

export interface TrayServiceOptions {
  readonly db: Database;
  readonly images: ImageTable;
  readonly scales: ImageScaleTable;
  readonly jobTable: JobTable;
  readonly clock: Clock;
  /** work was enqueued */
  readonly nudge: () => void;
}

/** The sorting tray: pictures on their way from a file to a find. */
export class TrayService {
  constructor(private readonly options: TrayServiceOptions) {}

  async list(ownerId: string): Promise<TrayPicture[]> {
    return this.views(await this.options.images.tray(ownerId));
  }

  /** Takes up intake again. @throws {Conflict} `not-refused` */
  async retry(imageId: string): Promise<TrayPicture> {
    const { db, images, jobTable, clock, nudge } = this.options;
    await db.write.transaction(async (trx) => {
      if (!(await images.setWaiting(imageId, trx)))
        throw new Conflict('not-refused', 'Only what was refused can be tried again.');
      await jobTable.enqueue(trx, { kind: 'intake', about: imageId, now: instant(clock) });
    });
    nudge();
    const image = await images.find(imageId);
    if (!image) throw new NotFound('image');
    return (await this.views([image]))[0] as TrayPicture;
  }

  /**
   * Takes a picture out of the tray, for good.
   * @throws {Conflict} `in-a-find`; `calibration-evidence`, which a scale rests upon
   */
  async discard(imageId: string): Promise<void> {
    const { db, images, jobTable, clock, nudge } = this.options;
    await db.write.transaction(async (trx) => {
      const image = await images.find(imageId, trx);
      if (!image) throw new NotFound('image');
      if (image.observationId !== null) throw new Conflict('in-a-find', 'A picture of a find is not discarded.');
      if (await images.isEvidence(imageId, trx))
        throw new Conflict('calibration-evidence', 'A calibration rests upon it.');
      await images.remove(imageId, trx);
      await jobTable.enqueue(trx, {
        kind: 'forget-files',
        about: imageId,
        payload: { sha256: image.sha256 },
        now: instant(clock),
      });
    });
    nudge();
  }

  private async views(pictures: readonly Image[]): Promise<TrayPicture[]> {
    const same = await this.options.images.sameBytes(pictures);
    return Promise.all(
      pictures.map(async (image) => {
        const earlier = same.find((other) => other.sha256 === image.sha256 && other.id < image.id);
        return {
          id: image.id,
          name: image.originalName,
          bytes: image.bytes,
          state: image.state,
          refusal: image.refusal,
          sameAs: earlier ? { imageId: earlier.id, name: earlier.name, findNumber: earlier.findNumber } : null,
          capture: isReady(image) ? image.capture : null,
          exactPlace: image.exactPlace,
          role: image.role,
          light: image.light,
          settingId: image.settingId,
          image: isReady(image) ? toImageTile(image, await this.currentScale(image)) : null,
          uploadedAt: image.uploadedAt,
        };
      }),
    );
  }

  private async currentScale(image: Image) {
    return image.currentScaleId === null
      ? null
      : ((await this.options.scales.find(image.currentScaleId))?.scale ?? null);
  }
}
