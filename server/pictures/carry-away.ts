import sharp from 'sharp';
import type { Overlay } from '../exports/scale-bar-drawing.js';
import type { RightsNotes } from '../exports/rights-notes.js';

/** Encoding without chroma subsampling keeps the edges of the bar where they were drawn. */
const JPEG_QUALITY = 92;
const TIMEOUT_S = 60;

/**
 * A copy of the whole picture to carry away, cut from the access copy.
 *
 * @param levels  sizes of the access copy's pages, largest first
 * @param overlay the bar; null for a copy without
 */
export async function carryAway(input: {
  readonly access: string;
  readonly levels: readonly { readonly width: number; readonly height: number }[];
  readonly size: { readonly width: number; readonly height: number };
  readonly format: 'jpeg' | 'png';
  readonly overlay: Overlay | null;
  readonly rights: RightsNotes;
}): Promise<Buffer> {
  const { access, levels, size, format, overlay, rights } = input;
  const page = Math.max(
    0,
    levels.findLastIndex((level) => level.width >= size.width),
  );
  let picture = sharp(access, { page }).resize({ ...size, fit: 'fill' });
  if (overlay) {
    // a bar on a very small copy may be larger than the copy itself: what does not fit is cut off
    const drawn = await sharp(Buffer.from(overlay.svg))
      .extract({
        left: 0,
        top: 0,
        width: Math.min(overlay.width, size.width),
        height: Math.min(overlay.height, size.height),
      })
      .png()
      .toBuffer();
    picture = picture.composite([{ input: drawn, left: overlay.left, top: overlay.top }]);
  }
  picture = picture.withExif({ IFD0: { ...rights.exif } }).withXmp(rights.xmp);
  const encoded =
    format === 'jpeg' ? picture.jpeg({ quality: JPEG_QUALITY, chromaSubsampling: '4:4:4' }) : picture.png();
  return encoded.timeout({ seconds: TIMEOUT_S }).toBuffer();
}

/** Size of a copy of this width, px; never larger than the original or `most`. */
export function copySize(
  original: { readonly width: number; readonly height: number },
  width: number | undefined,
  most: number,
): { width: number; height: number } {
  const longest = Math.min(original.width, most);
  const asked = Math.min(width ?? longest, longest);
  return { width: asked, height: Math.max(1, Math.round((original.height * asked) / original.width)) };
}
