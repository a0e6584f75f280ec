import { deliveryRoutes } from '../../shared/contracts/delivery.js';
import { VISITOR, can } from '../../shared/permission/can.js';
import { type Clock, today } from '../clock.js';
import type { ImageTable } from '../db/images.js';
import type { ThingTable } from '../db/things.js';
import { NotFound } from '../problem.js';
import type { PictureFiles } from '../pictures/picture-files.js';
import { sendFile } from './gone.js';
import type { Mount } from './mount.js';

/** Caches that many share ask again after a minute: a find may be hidden again, and then they must forget it. */
const FOR_EVER = 'max-age=31536000, immutable, s-maxage=60';
/** What a browser of somebody who may see a hidden picture keeps, until perhaps somebody else uses it. */
const FOR_A_DAY = 'max-age=86400';

/** How long an answer that never changes may be kept, and by whom. */
export async function cacheControl(
  things: ThingTable,
  clock: Clock,
  imageId: string,
): Promise<{ public: boolean; header: string }> {
  const thing = await things.load('image', imageId);
  const isPublic = thing?.kind === 'image' && can(VISITOR, 'image.read', thing, today(clock));
  return { public: isPublic, header: isPublic ? `public, ${FOR_EVER}` : `private, ${FOR_A_DAY}` };
}

export function mountRenditions(
  mount: Mount,
  { images, files, things, clock }: { images: ImageTable; files: PictureFiles; things: ThingTable; clock: Clock },
): void {
  mount.route(deliveryRoutes.rendition, async ({ params, res }) => {
    const { imageId = '', revision = '', file = '' } = params;
    const image = await images.find(imageId);
    const width = image?.renditionWidths.find((candidate) => `${candidate}.webp` === file);
    if (!image || width === undefined || revision !== String(image.revision)) throw new NotFound('rendition');
    const { header } = await cacheControl(things, clock, imageId);
    await sendFile(res, files.rendition(image, width), { 'Cache-Control': header, 'Content-Type': 'image/webp' });
  });
}
