/** Offered to the file chooser; what a file truly is, its first bytes decide. */
export const ACCEPT = 'image/jpeg,image/png,image/tiff,image/webp,.jpg,.jpeg,.png,.tif,.tiff,.webp';

/** How many bytes `notTaken` wants to see. */
export const HEAD_BYTES = 12;

/**
 * Why a file is refused, by its first bytes, so that a wrong one is told at once instead of after its upload.
 * The server looks again, and closer.
 *
 * @param head the first `HEAD_BYTES` bytes
 * @returns null when it looks like a picture that is taken; otherwise what it is, or `unknown`
 * @see the formats' own signatures: JPEG (ITU-T T.81, SOI), PNG (W3C, §5.2), TIFF 6.0 and BigTIFF, WebP (RFC 9649)
 */
export function notTaken(head: Uint8Array): string | null {
  const starts = (...bytes: number[]) => bytes.every((byte, at) => head[at] === byte);
  const text = (from: number, to: number) => String.fromCharCode(...head.subarray(from, to));
  if (starts(0xff, 0xd8, 0xff)) return null;
  if (starts(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a)) return null;
  if (['II*\0', 'MM\0*', 'II+\0', 'MM\0+'].includes(text(0, 4))) return null;
  if (text(0, 4) === 'RIFF' && text(8, 12) === 'WEBP') return null;
  if (text(4, 8) === 'ftyp') return FTYP_BRANDS[text(8, 12)] ?? 'MP4';
  return Object.entries(OTHERS).find(([start]) => text(0, start.length) === start)?.[1] ?? 'unknown';
}

/** What phones and programs are likely to bring besides. */
const FTYP_BRANDS: Readonly<Record<string, string>> = {
  heic: 'HEIC',
  heix: 'HEIC',
  hevc: 'HEIC',
  mif1: 'HEIC',
  msf1: 'HEIC',
  avif: 'AVIF',
};
const OTHERS: Readonly<Record<string, string>> = { GIF8: 'GIF', '%PDF': 'PDF', BM: 'BMP' };

/** The files of a drop, those in dropped folders too. */
export async function droppedFiles(transfer: DataTransfer): Promise<File[]> {
  // Entries must be taken before the first await: the browser empties the list when the event is over.
  const entries = [...transfer.items].flatMap((item) => item.webkitGetAsEntry?.() ?? []);
  if (entries.length === 0) return [...transfer.files];
  return (await Promise.all(entries.map(filesOf))).flat();
}

async function filesOf(entry: FileSystemEntry): Promise<File[]> {
  if (entry.isFile) {
    return [await new Promise<File>((resolve, reject) => (entry as FileSystemFileEntry).file(resolve, reject))];
  }
  const reader = (entry as FileSystemDirectoryEntry).createReader();
  const found: FileSystemEntry[] = [];
  // A reader answers at most a hundred at a time, and nothing when it is through.
  for (;;) {
    const some = await new Promise<FileSystemEntry[]>((resolve, reject) => reader.readEntries(resolve, reject));
    if (some.length === 0) break;
    found.push(...some);
  }
  return (await Promise.all(found.map(filesOf))).flat();
}
