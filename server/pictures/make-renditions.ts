import { join } from 'node:path';
import sharp, { type SharpOptions } from 'sharp';
import { ACCESS_COPY, renditionFile } from './picture-files.js';
import { displayStretch } from './display-stretch.js';

/** Widths that pages choose from; the original's own comes in when it is smaller than the largest. */
const RENDITION_WIDTHS = [320, 640, 1280, 1920];
export const TILE_PX = 512;
/** At 90 and above libvips stores RGB tiles: four times the size, and slower. */
const ACCESS_QUALITY = 89;
const RENDITION_QUALITY = 82;
/** What shows through where a picture is transparent. */
const BEHIND = '#ffffff';

export function renditionWidths(width: number): number[] {
  const smaller = RENDITION_WIDTHS.filter((candidate) => candidate < width);
  const largest = RENDITION_WIDTHS[RENDITION_WIDTHS.length - 1] as number;
  return width <= largest ? [...smaller, width] : smaller;
}

/**
 * Makes the access copy: the upright picture in sRGB, 8 bits, as a pyramid of JPEG tiles. It carries nothing
 * of the file's own notes.
 */
export async function makeAccessCopy(input: {
  readonly source: string;
  readonly folder: string;
  /** of the upright picture, px */
  readonly size: { readonly width: number; readonly height: number };
  readonly bitDepth: number;
  readonly options: SharpOptions;
}): Promise<void> {
  const { source, folder, size, bitDepth, options } = input;
  const stretch = bitDepth > 8 ? await displayStretch(source, options) : null;
  let picture = sharp(source, options).autoOrient().flatten({ background: BEHIND });
  if (stretch) picture = picture.linear(stretch.gain, stretch.offset);
  await picture
    .toColourspace('srgb')
    .tiff({
      tile: true,
      tileWidth: tilePx(size),
      tileHeight: tilePx(size),
      pyramid: true,
      compression: 'jpeg',
      quality: ACCESS_QUALITY,
      bigtiff: false,
    })
    .toFile(join(folder, ACCESS_COPY));
}

/** libvips does not read back tiles that are many times larger than their picture. */
function tilePx({ width, height }: { readonly width: number; readonly height: number }): number {
  return Math.max(width, height) <= 256 ? 128 : TILE_PX;
}

/**
 * Makes the small copies from the access copy, each from its smallest page that is large enough: decoding the
 * original once and going on from the pyramid took half the time of any other order.
 */
export async function makeRenditions(folder: string, size: { width: number; height: number }): Promise<number[]> {
  const access = join(folder, ACCESS_COPY);
  const levels = await readLevels(access);
  const widths = renditionWidths(size.width);
  for (const width of widths) {
    const page = levels.findLastIndex((level) => level.width >= width);
    await sharp(access, { page: Math.max(0, page) })
      .resize({ width, height: Math.max(1, Math.round((size.height * width) / size.width)), fit: 'fill' })
      .webp({ quality: RENDITION_QUALITY })
      .toFile(join(folder, renditionFile(width)));
  }
  return widths;
}

/** Sizes of the pages of an access copy, largest first. */
export async function readLevels(access: string): Promise<{ width: number; height: number }[]> {
  const { pages = 1 } = await sharp(access).metadata();
  const levels = [];
  for (let page = 0; page < pages; page++) {
    const { width, height } = await sharp(access, { page }).metadata();
    levels.push({ width, height });
  }
  return levels;
}

/** Three colours of the picture's own, left to right: what a page shows until the picture is there. */
export async function placeholderColours(folder: string): Promise<string[]> {
  const access = join(folder, ACCESS_COPY);
  const levels = await readLevels(access);
  const { data } = await sharp(access, { page: levels.length - 1 })
    .resize({ width: 3, height: 1, fit: 'fill' })
    .toColourspace('srgb')
    .removeAlpha()
    .raw()
    .toBuffer({ resolveWithObject: true });
  return [0, 1, 2].map((i) => `#${data.subarray(i * 3, i * 3 + 3).toString('hex')}`);
}
