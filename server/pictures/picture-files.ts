import { randomUUID } from 'node:crypto';
import { mkdirSync } from 'node:fs';
import { mkdir, open, readdir, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';

/**
 * Where pictures lie in the data folder:
 *
 *     uploads/{id}, {id}.json              what is on its way in
 *     originals/ab/{sha256}                every original, byte for byte, once however often it was brought in
 *     renditions/{id}~{revision}/          access.tif and {width}.webp, made from the original
 *     renditions/.making-…/                the same while it is being made; nobody sees it
 */
export class PictureFiles {
  readonly uploads: string;
  readonly originals: string;
  readonly renditions: string;

  constructor(dataDir: string) {
    this.uploads = join(dataDir, 'uploads');
    this.originals = join(dataDir, 'originals');
    this.renditions = join(dataDir, 'renditions');
    for (const folder of [this.uploads, this.originals, this.renditions]) mkdirSync(folder, { recursive: true });
  }

  original(sha256: string): string {
    return join(this.originals, sha256.slice(0, 2), sha256);
  }

  /** The folder of everything made from a picture; its name is also the one in URLs. */
  made(picture: { readonly id: string; readonly revision: number }): string {
    return join(this.renditions, `${picture.id}~${picture.revision}`);
  }

  accessCopy(picture: { readonly id: string; readonly revision: number }): string {
    return join(this.made(picture), ACCESS_COPY);
  }

  rendition(picture: { readonly id: string; readonly revision: number }, width: number): string {
    return join(this.made(picture), renditionFile(width));
  }

  /** A new empty folder to make things in, on the same disk as where they will lie. */
  async making(): Promise<string> {
    const folder = join(this.renditions, `${MAKING}${randomUUID()}`);
    await mkdir(folder);
    return folder;
  }

  /** Puts a finished folder in its place, whole or not at all. */
  async putInPlace(folder: string, picture: { readonly id: string; readonly revision: number }): Promise<void> {
    for (const file of await readdir(folder)) await sync(join(folder, file));
    await sync(folder);
    // left by a run that was cut off before it was written down: nobody has been shown it
    await rm(this.made(picture), { recursive: true, force: true });
    await rename(folder, this.made(picture));
    await sync(this.renditions);
  }

  /** Removes what a run that was cut off left half-made. Only while nothing is being made. */
  async clearHalfMade(): Promise<void> {
    for (const name of await readdir(this.renditions)) {
      if (name.startsWith(MAKING)) await rm(join(this.renditions, name), { recursive: true, force: true });
    }
  }

  /** Every folder of things made from this picture, whatever the revision. */
  async forgetMade(id: string): Promise<void> {
    for (const name of await readdir(this.renditions)) {
      if (name.startsWith(`${id}~`)) await rm(join(this.renditions, name), { recursive: true, force: true });
    }
  }

  async forgetOriginal(sha256: string): Promise<void> {
    await rm(this.original(sha256), { force: true });
    await sync(dirname(this.original(sha256))).catch((error: unknown) => {
      // its folder was never made: there was no such original
      if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
    });
  }
}

const MAKING = '.making-';
export const ACCESS_COPY = 'access.tif';

export function renditionFile(width: number): string {
  return `${width}.webp`;
}

/** Waits until a file's bytes, or a folder's names, are on the disk. */
export async function sync(path: string): Promise<void> {
  const handle = await open(path, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
