import { createHash } from 'node:crypto';
import type { Request, Response } from 'express';
import { deliveryRoutes } from '../../shared/contracts/delivery.js';
import type { Clock } from '../clock.js';
import type { ReadyImage } from '../db/images.js';
import type { ThingTable } from '../db/things.js';
import { NotFound } from '../problem.js';
import { iiifInfo } from '../pictures/iiif-info.js';
import { type IiifFormat, parseIiifRequest } from '../pictures/iiif-request.js';
import type { PictureServer } from '../pictures/picture-server.js';
import type { ImageService } from '../services/images.js';
import { unlessGone } from './gone.js';
import type { Mount } from './mount.js';
import { cacheControl } from './renditions.js';

const PROFILE = 'http://iiif.io/api/image/3/context.json';
const MEDIA_TYPE: Record<IiifFormat, string> = { jpg: 'image/jpeg', png: 'image/png', webp: 'image/webp' };

type Params = Readonly<Record<string, string>>;

export interface IiifOptions {
  readonly images: ImageService;
  readonly pictures: PictureServer;
  readonly things: ThingTable;
  readonly clock: Clock;
  /** what ids begin with, without a trailing slash */
  readonly publicUrl: string;
}

/**
 * IIIF Image API 3 over the access copies, bounded by `maxArea`. `/iiif/{id}` is the stable id that manifests
 * carry; `/iiif/{id}~{revision}` answers the same for ever.
 */
export function mountIiif(mount: Mount, options: IiifOptions): void {
  const { images, pictures, things, clock, publicUrl } = options;

  const find = async ({ imageId = '', revision }: Params): Promise<ReadyImage> => {
    const image = await images.ready(imageId);
    if (revision !== undefined && revision !== String(image.revision)) throw new NotFound('image');
    return image;
  };

  /** Says who may keep the answer; true when whoever asks has it already. */
  const known = async (req: Request, res: Response, image: ReadyImage, params: Params): Promise<boolean> => {
    const cache = await cacheControl(things, clock, image.id);
    const stable = params['revision'] === undefined;
    res.set('Cache-Control', stable ? `${cache.public ? 'public' : 'private'}, no-cache` : cache.header);
    if (cache.public) {
      // other people's viewers may show what everybody sees
      res.set({ 'Access-Control-Allow-Origin': '*', 'Cross-Origin-Resource-Policy': 'cross-origin' });
    }
    res.set('Vary', 'Accept');
    res.set(
      'ETag',
      `"${createHash('sha256')
        .update(`${image.revision} ${image.licence} ${req.path} ${accepts(req)}`)
        .digest('base64url')
        .slice(0, 22)}"`,
    );
    if (!req.fresh) return false;
    res.status(304).end();
    return true;
  };

  const info = async ({ params, req, res }: { params: Params; req: Request; res: Response }): Promise<void> => {
    const image = await find(params);
    if (await known(req, res, image, params)) return;
    const name = params['revision'] === undefined ? image.id : `${image.id}~${image.revision}`;
    const { width, height, licence } = image;
    const body = iiifInfo({
      id: `${publicUrl}/iiif/${name}`,
      width,
      height,
      licence,
      levels: await pictures.levels(image),
    });
    // bytes, so that Express adds no character set: JSON has none
    res.setHeader(
      'Content-Type',
      accepts(req) === 'ld' ? `application/ld+json;profile="${PROFILE}"` : 'application/json',
    );
    res.send(Buffer.from(JSON.stringify(body)));
  };

  const picture = async ({ params, req, res }: { params: Params; req: Request; res: Response }): Promise<void> => {
    const image = await find(params);
    const { region = '', size = '', rotation = '', file = '' } = params;
    const request = parseIiifRequest({ region, size, rotation, file }, image);
    if (await known(req, res, image, params)) return;
    const bytes = await unlessGone(res, (signal) => pictures.iiif(image, request, signal));
    if (bytes === null) return;
    res.type(MEDIA_TYPE[request.format]);
    res.set('Link', `<${PROFILE.replace('context.json', 'level2.json')}>;rel="profile"`);
    res.send(bytes);
  };

  const base = ({ req, res }: { req: Request; res: Response }): void => {
    res.set('Access-Control-Allow-Origin', '*');
    res.redirect(303, `${publicUrl}${req.path.replace(/\/$/, '')}/info.json`);
  };

  // those with a revision first: `{id}~{revision}` would also do for an id
  mount.route(deliveryRoutes.iiifInfoOfRevision, info);
  mount.route(deliveryRoutes.iiifImageOfRevision, picture);
  mount.route(deliveryRoutes.iiifBaseOfRevision, base);
  mount.route(deliveryRoutes.iiifInfo, info);
  mount.route(deliveryRoutes.iiifImage, picture);
  mount.route(deliveryRoutes.iiifBase, base);
}

/** JSON-LD to those who ask for it by name, plain JSON to everybody else. */
function accepts(req: Request): 'ld' | 'json' {
  return /application\/ld\+json/.test(req.get('Accept') ?? '') ? 'ld' : 'json';
}
