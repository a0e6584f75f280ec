import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { pipeline } from 'node:stream/promises';
import type { IntegrityView } from '../../shared/contracts/keep.js';
import { type Clock, instant } from '../clock.js';
import type { KeptOriginals } from '../db/kept-originals.js';
import type { PictureFiles } from '../pictures/picture-files.js';

/** Whether every original is still there, byte for byte. */
export class IntegrityService {
  constructor(
    private readonly originals: Pick<KeptOriginals, 'list'>,
    private readonly files: Pick<PictureFiles, 'original'>,
    private readonly clock: Clock,
  ) {}

  /** Reads one original after another, so that the disk stays free for everybody else. */
  async check(): Promise<IntegrityView> {
    const pictures = await this.originals.list();
    const states = new Map<string, { bytes: number; fault: 'missing' | 'changed' | null }>();
    for (const { sha256 } of pictures) {
      if (!states.has(sha256)) states.set(sha256, await examine(this.files.original(sha256), sha256));
    }
    return {
      checkedAt: instant(this.clock),
      originals: states.size,
      bytes: [...states.values()].reduce((sum, { bytes }) => sum + bytes, 0),
      faults: pictures.flatMap(({ imageId, name, sha256 }) => {
        const fault = states.get(sha256)?.fault;
        return fault ? [{ imageId, name, fault }] : [];
      }),
    };
  }
}

async function examine(path: string, sha256: string): Promise<{ bytes: number; fault: 'missing' | 'changed' | null }> {
  const hash = createHash('sha256');
  let bytes = 0;
  try {
    await pipeline(createReadStream(path), async (chunks: AsyncIterable<Buffer>) => {
      for await (const chunk of chunks) {
        bytes += chunk.length;
        hash.update(chunk);
      }
    });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return { bytes: 0, fault: 'missing' };
    throw error;
  }
  return { bytes, fault: hash.digest('hex') === sha256 ? null : 'changed' };
}
