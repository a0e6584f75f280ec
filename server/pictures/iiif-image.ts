import sharp, { type Sharp } from 'sharp';
import type { IiifFormat, IiifRequest } from './iiif-request.js';

/** Ends work that its own limits did not foresee, s. */
const TIMEOUT_S = 15;
const QUALITY = 89;

type Region = IiifRequest['region'];
type Size = IiifRequest['size'];

/**
 * Reads a region from the page of the access copy that suits the size, and encodes it.
 *
 * @param access path of the access copy; @param levels its pages, largest first
 */
export async function renderIiif(access: string, levels: readonly Size[], request: IiifRequest): Promise<Buffer> {
  const { page, crop } = choosePage(levels, request.region, request.size);
  let picture = sharp(access, { page })
    .extract(crop)
    .resize({ ...request.size, fit: 'fill' });
  picture = await turned(picture, request);
  if (request.quality === 'gray') picture = picture.greyscale();
  if (request.quality === 'bitonal') picture = picture.greyscale().threshold(128);
  return encoded(picture, request.format).timeout({ seconds: TIMEOUT_S }).toBuffer();
}

/**
 * The smallest page that still has the pixels asked for and in which the region begins and ends on whole
 * pixels, or so nearly that it moves the answer by less than an eighth of a pixel.
 */
export function choosePage(
  levels: readonly Size[],
  region: Region,
  size: Size,
): { page: number; crop: { left: number; top: number; width: number; height: number } } {
  const [full] = levels as [Size];
  const reduction = Math.min(region.width / size.width, region.height / size.height);
  for (let page = levels.length - 1; page > 0; page--) {
    const factor = 2 ** page;
    if (factor > reduction) continue;
    const onWhole =
      [region.x, region.y].every((edge) => edge % factor === 0) &&
      wholeOrEdge(region.x + region.width, full.width, factor) &&
      wholeOrEdge(region.y + region.height, full.height, factor);
    if (onWhole || factor * 4 <= reduction) return { page, crop: cropOf(region, factor, levels[page] as Size) };
  }
  return { page: 0, crop: cropOf(region, 1, full) };
}

function wholeOrEdge(end: number, whole: number, factor: number): boolean {
  return end === whole || end % factor === 0;
}

/** In the pixels of a page; libvips halves each level and drops an odd last row, so the far edge is held. */
function cropOf(
  region: Region,
  factor: number,
  level: Size,
): { left: number; top: number; width: number; height: number } {
  const left = Math.min(Math.round(region.x / factor), level.width - 1);
  const top = Math.min(Math.round(region.y / factor), level.height - 1);
  const right = Math.min(Math.round((region.x + region.width) / factor), level.width);
  const bottom = Math.min(Math.round((region.y + region.height) / factor), level.height);
  return { left, top, width: Math.max(1, right - left), height: Math.max(1, bottom - top) };
}

/** Mirrored first, then turned clockwise; sharp's own order within one pipeline is another one. */
async function turned(picture: Sharp, { mirrored, rotation }: IiifRequest): Promise<Sharp> {
  if (!mirrored && rotation === 0) return picture;
  const upright = await picture.raw().toBuffer({ resolveWithObject: true });
  const flopped = mirrored ? await fromRaw(upright).flop().raw().toBuffer({ resolveWithObject: true }) : upright;
  return fromRaw(flopped).rotate(rotation);
}

function fromRaw({
  data,
  info,
}: {
  data: Buffer;
  info: { width: number; height: number; channels: 1 | 2 | 3 | 4 };
}): Sharp {
  return sharp(data, { raw: { width: info.width, height: info.height, channels: info.channels } });
}

function encoded(picture: Sharp, format: IiifFormat): Sharp {
  switch (format) {
    case 'jpg':
      return picture.jpeg({ quality: QUALITY });
    case 'png':
      return picture.png();
    case 'webp':
      return picture.webp({ quality: QUALITY });
  }
}
