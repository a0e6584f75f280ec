import { open } from 'node:fs/promises';

export const PICTURE_TYPES = ['jpeg', 'png', 'tiff', 'webp'] as const;
export type PictureType = (typeof PICTURE_TYPES)[number];

/** Media types, for answers that carry an original. */
export const MEDIA_TYPE: Record<PictureType, string> = {
  jpeg: 'image/jpeg',
  png: 'image/png',
  tiff: 'image/tiff',
  webp: 'image/webp',
};

/** What a file is by its first bytes; its name is never asked. */
export type Sniffed =
  { readonly accepted: true; readonly type: PictureType } | { readonly accepted: false; readonly found: string };

export async function sniffFile(path: string): Promise<Sniffed> {
  const handle = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(512), 0, 512, 0);
    return sniff(buffer.subarray(0, bytesRead));
  } finally {
    await handle.close();
  }
}

/** @param head the first bytes of a file, 512 suffice */
export function sniff(head: Buffer): Sniffed {
  const accepted = ACCEPTED.find(({ test }) => test(head));
  if (accepted) return { accepted: true, type: accepted.type };
  return {
    accepted: false,
    found: KNOWN.find(({ test }) => test(head))?.found ?? (head.length === 0 ? 'nothing' : 'unknown'),
  };
}

const starts = (text: string) => (head: Buffer) => head.subarray(0, text.length).toString('latin1') === text;
const brand =
  (...brands: string[]) =>
  (head: Buffer) =>
    head.subarray(4, 8).toString('latin1') === 'ftyp' && brands.includes(head.subarray(8, 12).toString('latin1'));

const ACCEPTED: readonly { type: PictureType; test: (head: Buffer) => boolean }[] = [
  { type: 'jpeg', test: starts('\xff\xd8\xff') },
  { type: 'png', test: starts('\x89PNG\r\n\x1a\n') },
  // classic and big TIFF, in both orders of bytes
  {
    type: 'tiff',
    test: (head) => ['II*\0', 'MM\0*', 'II+\0', 'MM\0+'].includes(head.subarray(0, 4).toString('latin1')),
  },
  { type: 'webp', test: (head) => starts('RIFF')(head) && head.subarray(8, 12).toString('latin1') === 'WEBP' },
];

/** What people are likely to bring besides, so that the refusal can name it. */
const KNOWN: readonly { found: string; test: (head: Buffer) => boolean }[] = [
  { found: 'GIF', test: starts('GIF8') },
  { found: 'AVIF', test: brand('avif', 'avis') },
  { found: 'HEIC', test: brand('heic', 'heix', 'hevc', 'hevx', 'heim', 'heis', 'mif1', 'msf1') },
  { found: 'CR3', test: brand('crx ') },
  { found: 'MP4', test: (head) => head.subarray(4, 8).toString('latin1') === 'ftyp' },
  { found: 'PDF', test: starts('%PDF') },
  { found: 'BMP', test: starts('BM') },
  {
    found: 'JPEG XL',
    test: (head) => starts('\xff\x0a')(head) || head.subarray(4, 12).toString('latin1') === 'JXL \r\n\x87\n',
  },
  { found: 'JPEG 2000', test: (head) => head.subarray(4, 8).toString('latin1') === 'jP  ' },
  { found: 'ZIP', test: starts('PK\x03\x04') },
  { found: 'SVG', test: (head) => /<svg[\s>]/i.test(head.toString('latin1')) },
];
