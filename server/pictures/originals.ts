import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { copyFile, link, mkdir, rename, rm, stat } from 'node:fs/promises';
import { dirname } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { type PictureFiles, sync } from './picture-files.js';

/** SHA-256 of a file, hexadecimal, read as a stream. */
export async function sha256Of(path: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path), hash);
  return hash.digest('hex');
}

/** Originals lie under the SHA-256 of their bytes, so that the same bytes are kept once. */
export class Originals {
  private readonly turns = new Map<string, Promise<unknown>>();

  constructor(private readonly files: PictureFiles) {}

  /**
   * Gives the file a second name among the originals. The first stays, so that whatever happens before the
   * picture is written down, the file is still where it came in.
   */
  async keep(path: string, sha256: string): Promise<void> {
    const target = this.files.original(sha256);
    await sync(path);
    await mkdir(dirname(target), { recursive: true });
    if (!(await sameSize(path, target))) {
      await rm(target, { force: true }); // a damaged one: these bytes are right
      await linkOrCopy(path, target);
    }
    await sync(dirname(target));
    await sync(this.files.originals);
  }

  /** One thing at a time per original: nobody removes what somebody else is just bringing in again. */
  inTurn<T>(sha256: string, work: () => Promise<T>): Promise<T> {
    const before = this.turns.get(sha256) ?? Promise.resolve();
    const turn = before.then(work, work);
    this.turns.set(sha256, turn);
    const leave = (): void => {
      if (this.turns.get(sha256) === turn) this.turns.delete(sha256);
    };
    turn.then(leave, leave);
    return turn;
  }
}

async function sameSize(path: string, target: string): Promise<boolean> {
  try {
    const [a, b] = await Promise.all([stat(path), stat(target)]);
    return a.size === b.size;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return false; // no such original yet
    throw error;
  }
}

async function linkOrCopy(path: string, target: string): Promise<void> {
  try {
    await link(path, target);
  } catch (error) {
    // some file systems know no second names: copy beside, then rename, so that half a file is never seen
    if (!['EPERM', 'ENOTSUP', 'EOPNOTSUPP', 'ENOSYS', 'EMLINK'].includes((error as NodeJS.ErrnoException).code ?? ''))
      throw error;
    const beside = `${target}.part`;
    await copyFile(path, beside);
    await sync(beside);
    await rename(beside, target);
  }
}
