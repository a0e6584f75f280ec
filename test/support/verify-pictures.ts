import { access, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { Database } from '../../server/db/database.js';
import { type Image, type ImageRow, isReady, toImage } from '../../server/db/images.js';
import { sha256Of } from '../../server/pictures/originals.js';
import { ACCESS_COPY, PictureFiles, renditionFile } from '../../server/pictures/picture-files.js';

interface PictureFault {
  readonly fault:
    | 'original-missing'
    | 'original-changed'
    /** a picture is shown whose copies are not all there */
    | 'copy-missing'
    /** files that no picture needs: they cost space and nothing else */
    | 'spare-original'
    | 'spare-copies';
  /** the picture, or the file that belongs to none */
  readonly of: string;
}

/**
 * Holds the data folder against the database: every picture has its original with the right SHA-256, every
 * picture that is shown has all its copies, and what lies there belongs to a picture.
 */
export async function verifyPictures(dataDir: string, db: Pick<Database, 'read'>): Promise<PictureFault[]> {
  const files = new PictureFiles(dataDir);
  const images = (await db.read<ImageRow>('images').orderBy('id')).map(toImage);
  const faults: PictureFault[] = [];
  for (const image of images) {
    const found = await originalFault(files, image);
    if (found) faults.push({ fault: found, of: image.id });
    if (isReady(image) && !(await allThere(expectedCopies(files, image))))
      faults.push({ fault: 'copy-missing', of: image.id });
  }
  const originals = new Set(images.map((image) => image.sha256));
  for (const folder of await readdir(files.originals)) {
    for (const name of await readdir(join(files.originals, folder))) {
      if (!originals.has(name)) faults.push({ fault: 'spare-original', of: name });
    }
  }
  const made = new Set(images.filter(isReady).map((image) => `${image.id}~${image.revision}`));
  for (const name of await readdir(files.renditions)) {
    if (!made.has(name)) faults.push({ fault: 'spare-copies', of: name });
  }
  return faults;
}

async function originalFault(
  files: PictureFiles,
  image: Image,
): Promise<'original-missing' | 'original-changed' | null> {
  try {
    return (await sha256Of(files.original(image.sha256))) === image.sha256 ? null : 'original-changed';
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return 'original-missing';
    throw error;
  }
}

function expectedCopies(files: PictureFiles, image: Image): string[] {
  return [ACCESS_COPY, ...image.renditionWidths.map(renditionFile)].map((name) => join(files.made(image), name));
}

async function allThere(paths: readonly string[]): Promise<boolean> {
  const found = await Promise.allSettled(paths.map((path) => access(path)));
  return found.every(({ status }) => status === 'fulfilled');
}
