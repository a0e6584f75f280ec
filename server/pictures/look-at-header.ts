import sharp, { type Metadata } from 'sharp';
import type { Orientation } from '../../shared/geometry/orientation.js';
import { uprightSize } from '../../shared/geometry/orientation.js';
import { type PictureType, sniffFile } from './file-type.js';
import { Refused } from './refusal.js';

export interface Header {
  readonly type: PictureType;
  /** as stored, px */
  readonly stored: { readonly width: number; readonly height: number };
  /** once it is upright, px */
  readonly upright: { readonly width: number; readonly height: number };
  readonly bitDepth: 8 | 16;
  readonly exif: Buffer | null;
}

/**
 * Reads a picture's header, and no pixel, before anything larger is done with it.
 *
 * @throws {Refused} `type-not-accepted`, `too-many-pixels`, `not-readable`
 */
export async function lookAtHeader(path: string, maxPixels: number): Promise<Header> {
  const sniffed = await sniffFile(path);
  if (!sniffed.accepted) throw new Refused('type-not-accepted', { found: sniffed.found });
  const metadata = await readMetadata(path);
  if (metadata.format !== sniffed.type) throw new Refused('type-not-accepted', { found: metadata.format });
  const { width, height } = metadata;
  if (width * height > maxPixels) {
    throw new Refused('too-many-pixels', {
      megapixels: Math.ceil((width * height) / 1e5) / 10,
      mostMegapixels: maxPixels / 1e6,
    });
  }
  return {
    type: sniffed.type,
    stored: { width, height },
    upright: uprightSize({ width, height }, orientationOf(metadata.orientation)),
    bitDepth: bitDepthOf(metadata),
    exif: metadata.exif ?? null,
  };
}

async function readMetadata(path: string): Promise<Metadata> {
  try {
    return await sharp(path, { limitInputPixels: false, failOn: 'error' }).metadata();
  } catch (error) {
    throw new Refused('not-readable', { detail: String(error).slice(0, 200) });
  }
}

function orientationOf(value: number | undefined): Orientation {
  return value !== undefined && value >= 1 && value <= 8 ? (value as Orientation) : 1;
}

/** Float and 32-bit TIFF have no agreed way to be shown, and pictures of more than four bands are not photographs. */
function bitDepthOf({ format, depth, channels }: Metadata): 8 | 16 {
  if (depth !== 'uchar' && depth !== 'ushort')
    throw new Refused('type-not-accepted', { found: `${format.toUpperCase()}, ${depth}` });
  if (channels > 5) throw new Refused('type-not-accepted', { found: `${format.toUpperCase()}, ${channels} channels` });
  return depth === 'ushort' ? 16 : 8;
}
