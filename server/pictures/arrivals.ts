import { randomUUID } from 'node:crypto';
import { rm, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { ImageTable } from '../db/images.js';
import type { JobTable } from '../db/jobs.js';
import type { UserTable } from '../db/users.js';
import { failPoint } from '../fail-points.js';
import { newId } from '../ids.js';
import { NotFound } from '../problem.js';
import { type Originals, sha256Of } from './originals.js';
import type { PictureFiles } from './picture-files.js';

export interface ArrivalOptions {
  readonly db: Database;
  readonly images: ImageTable;
  readonly users: UserTable;
  readonly jobTable: JobTable;
  readonly files: PictureFiles;
  readonly originals: Originals;
  readonly clock: Clock;
  /** work was enqueued */
  readonly nudge: () => void;
}

/** Takes in a whole file, however it came: keeps its bytes, writes the picture down and has its intake done. */
export class Arrivals {
  constructor(private readonly options: ArrivalOptions) {}

  /**
   * Brings in a file from elsewhere; it stays where it is.
   * @returns the id of the new picture, which waits for its intake
   */
  async bringIn(input: {
    readonly file: string | Buffer;
    readonly name: string;
    readonly ownerId: string;
  }): Promise<string> {
    const { files } = this.options;
    if (typeof input.file === 'string')
      return this.arrive({ id: newId(), path: input.file, name: input.name, ownerId: input.ownerId });
    const path = join(files.uploads, `${randomUUID()}.whole`);
    await writeFile(path, input.file);
    try {
      return await this.arrive({ id: newId(), path, name: input.name, ownerId: input.ownerId });
    } finally {
      await rm(path, { force: true });
    }
  }

  /**
   * Keeps the file at `path` as the original of the picture `id`. Doing it again for an id that is written
   * down already changes nothing.
   */
  async arrive(input: {
    readonly id: string;
    readonly path: string;
    readonly name: string;
    readonly ownerId: string;
  }): Promise<string> {
    const { db, images, users, jobTable, originals, clock, nudge } = this.options;
    const { id, path, name, ownerId } = input;
    if (await images.find(id)) return id;
    const owner = await users.find(ownerId);
    if (!owner) throw new NotFound('person');
    const sha256 = await sha256Of(path);
    failPoint('upload:received');
    await originals.inTurn(sha256, async () => {
      await originals.keep(path, sha256);
      failPoint('upload:moved');
      const now = instant(clock);
      const { size: bytes } = await stat(path);
      await db.write.transaction(async (trx) => {
        if (await images.find(id, trx)) return; // the same upload was finished twice at once
        await images.insert(
          {
            ...{ id, ownerId, sha256, bytes, originalName: cleanName(name), uploadedAt: now },
            ...{ licence: owner.defaultLicence, creditLine: owner.creditLine },
          },
          trx,
        );
        await jobTable.enqueue(trx, { kind: 'intake', about: id, now });
      });
      failPoint('upload:recorded');
    });
    nudge();
    return id;
  }
}

const LONGEST_NAME = 200;

/** A file's own name without folders and control characters: shown, and offered again at download, never a path. */
export function cleanName(name: string): string {
  const last = name.split(/[/\\]/).pop() ?? '';
  const clean = last.replace(/[\p{Cc}\p{Cf}\u2028\u2029]/gu, '').trim();
  return clean === '' || clean === '.' || clean === '..' ? 'picture' : [...clean].slice(-LONGEST_NAME).join('');
}
