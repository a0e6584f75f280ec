import type { EditImage, ImageView } from '../../shared/contracts/images.js';
import { rayleigh } from '../../shared/scale/optics.js';
import { type Actor, can, type Thing } from '../../shared/permission/can.js';
import { type Clock, today } from '../clock.js';
import type { ImageScaleTable } from '../db/image-scales.js';
import type { ImageSurroundingsTable } from '../db/image-surroundings.js';
import { type Image, type ImageTable, isReady, type ReadyImage } from '../db/images.js';
import type { RigTable } from '../db/rigs.js';
import type { ThingTable } from '../db/things.js';
import { Conflict, Invalid, NotFound } from '../problem.js';
import { toImageTile } from './image-tile.js';

export interface ImageServiceOptions {
  readonly images: ImageTable;
  readonly scales: ImageScaleTable;
  readonly surroundings: ImageSurroundingsTable;
  readonly things: ThingTable;
  readonly rigs: RigTable;
  readonly clock: Clock;
}

/** Pictures as they are looked at and described. */
export class ImageService {
  constructor(private readonly options: ImageServiceOptions) {}

  /** @throws {Conflict} `not-ready` while it has not been taken in */
  async ready(imageId: string): Promise<ReadyImage> {
    const image = await this.options.images.find(imageId);
    if (!image) throw new NotFound('image');
    if (!isReady(image))
      throw new Conflict('not-ready', 'The picture has not been taken in yet.', { state: image.state });
    return image;
  }

  async view(actor: Actor, imageId: string): Promise<ImageView> {
    const { images, scales, surroundings, things, clock } = this.options;
    const image = await this.ready(imageId);
    const around = await surroundings.of(image);
    const current = image.currentScaleId === null ? null : await scales.find(image.currentScaleId);
    const versions = await scales.views(image.id);
    const thing = (await things.load('image', imageId)) as Extract<Thing, { kind: 'image' }>;
    const day = today(clock);
    return {
      ...toImageTile(image, current?.scale ?? null),
      title: image.title,
      role: image.role,
      light: image.light,
      licence: image.licence,
      creditLine: image.creditLine,
      owner: around.owner,
      bitDepth: image.bitDepth,
      format: image.format,
      sha256: image.sha256,
      // people put places into the names of their files
      originalName: can(actor, 'image.read-original', thing, day) ? image.originalName : '',
      capture: image.capture,
      settingId: image.settingId,
      find: around.find,
      preparation: around.preparation,
      currentScale: versions.find((version) => version.id === image.currentScaleId) ?? null,
      siblings: await images.siblings(image),
      resolutionUm: around.numericalAperture === null ? null : rayleigh(around.numericalAperture),
      may: { edit: can(actor, 'image.edit', thing, day), annotate: can(actor, 'image.annotate', thing, day) },
    };
  }

  /**
   * @throws {Invalid} for a preparation of another observation
   * @throws {NotFound} for a setting of somebody else's
   * @throws {Conflict} `has-scale` for another setting of a picture that has a scale
   */
  async edit(imageId: string, edit: EditImage): Promise<void> {
    const { images, surroundings } = this.options;
    const image = await images.find(imageId);
    if (!image) throw new NotFound('image');
    const observationId = edit.preparationId ? await surroundings.observationOf(edit.preparationId) : undefined;
    // null for a preparation that is not there, and a picture in the tray has no observation either
    if (observationId === null || (observationId !== undefined && observationId !== image.observationId)) {
      throw new Invalid([
        {
          pointer: '#/preparationId',
          code: 'other-observation',
          detail: 'The preparation belongs to another observation.',
        },
      ]);
    }
    if (edit.settingId !== undefined) await this.requireSetting(image, edit.settingId);
    await images.edit(imageId, edit);
  }

  /** A scale says by itself which setting it is of; another setting beside it would contradict it. */
  private async requireSetting(image: Image, settingId: string | null): Promise<void> {
    if (settingId === image.settingId) return;
    if (image.currentScaleId !== null) throw new Conflict('has-scale', 'The picture has a scale already.');
    if (settingId === null) return;
    const setting = await this.options.rigs.setting(settingId);
    const rig = setting && (await this.options.rigs.find(setting.rigId));
    if (rig?.ownerId !== image.ownerId) throw new NotFound('setting');
  }
}
