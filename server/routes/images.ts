import { imageRoutes } from '../../shared/contracts/images.js';
import { userIdOf } from '../middleware/actor.js';
import { NotFound } from '../problem.js';
import { MEDIA_TYPE } from '../pictures/file-type.js';
import type { PictureFiles } from '../pictures/picture-files.js';
import type { CarryAwayService } from '../services/carry-away.js';
import type { ImageService } from '../services/images.js';
import type { ScaleService } from '../services/scales.js';
import type { TrayService } from '../services/tray.js';
import type { ImageTable } from '../db/images.js';
import { sendFile, unlessGone } from './gone.js';
import type { Mount } from './mount.js';

export interface ImageRouteOptions {
  readonly images: ImageService;
  readonly table: ImageTable;
  readonly tray: TrayService;
  readonly scales: ScaleService;
  readonly carryAway: CarryAwayService;
  readonly files: PictureFiles;
}

export function mountImages(mount: Mount, { images, table, tray, scales, carryAway, files }: ImageRouteOptions): void {
  mount.route(imageRoutes.tray, ({ actor }) => tray.list(userIdOf(actor)));
  mount.route(imageRoutes.read, ({ actor, params }) => images.view(actor, idOf(params)));
  mount.route(imageRoutes.edit, async ({ actor, params, body }) => {
    await images.edit(idOf(params), body);
    return images.view(actor, idOf(params));
  });
  mount.route(imageRoutes.discard, ({ params }) => tray.discard(idOf(params)));
  mount.route(imageRoutes.retry, ({ params }) => tray.retry(idOf(params)));

  mount.route(imageRoutes.original, async ({ params, res }) => {
    const image = await table.find(idOf(params));
    if (!image) throw new NotFound('image');
    res.attachment(image.originalName);
    await sendFile(res, files.original(image.sha256), {
      'Content-Type': image.format ? MEDIA_TYPE[image.format] : 'application/octet-stream',
      'Cache-Control': 'private, no-transform', // byte for byte
    });
  });

  mount.route(imageRoutes.picture, async ({ params, query, res }) => {
    const image = await images.ready(idOf(params));
    const copy = await unlessGone(res, (signal) => carryAway.copy(image, query, signal));
    if (!copy) return;
    res.attachment(copy.name);
    res.set('Cache-Control', 'private, no-cache');
    res.type(query.format);
    res.send(copy.bytes);
  });

  mount.route(imageRoutes.scales, ({ params }) => scales.history(idOf(params)));
  mount.route(imageRoutes.setScale, async ({ actor, params, body }) => {
    await scales.set(userIdOf(actor), idOf(params), body);
    return images.view(actor, idOf(params));
  });
}

function idOf(params: Readonly<Record<string, string>>): string {
  return params['imageId'] ?? '';
}
