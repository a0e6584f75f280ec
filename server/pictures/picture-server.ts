import { LRUCache } from 'lru-cache';
import PQueue from 'p-queue';
import sharp from 'sharp';
import { HttpProblem } from '../problem.js';
import { renderIiif } from './iiif-image.js';
import type { IiifRequest } from './iiif-request.js';
import { readLevels } from './make-renditions.js';
import type { PictureFiles } from './picture-files.js';

const CACHE_BYTES = 64 * 1024 ** 2;
/** Side by side; libvips spreads each over the cores by itself. */
const AT_ONCE = 2;
/** More than a wall of viewers asks for; beyond, waiting is no use. */
const MOST_WAITING = 400;

interface Named {
  readonly id: string;
  readonly revision: number;
}

// a rendition is renamed into place and never changed, but sharp would go on with the header of an earlier file
sharp.cache(false);

/** Cuts pictures out of access copies, which are Motebook's own files: a few at a time, and remembers tiles. */
export class PictureServer {
  private readonly queue = new PQueue({ concurrency: AT_ONCE });
  private readonly tiles = new LRUCache<string, Buffer>({
    maxSize: CACHE_BYTES,
    sizeCalculation: (tile) => tile.length || 1,
  });
  private readonly known = new LRUCache<string, readonly { width: number; height: number }[]>({ max: 2000 });

  constructor(private readonly files: PictureFiles) {}

  /** sizes of the access copy's pages, largest first */
  async levels(picture: Named): Promise<readonly { width: number; height: number }[]> {
    const path = this.files.accessCopy(picture);
    const known = this.known.get(path);
    if (known) return known;
    const levels = await readLevels(path);
    this.known.set(path, levels);
    return levels;
  }

  /** @param signal aborted when whoever asked has left: what has not begun is dropped */
  async iiif(picture: Named, request: IiifRequest, signal: AbortSignal): Promise<Buffer> {
    const key = `${picture.id}~${picture.revision} ${JSON.stringify(request)}`;
    const remembered = this.tiles.get(key);
    if (remembered) return remembered;
    const levels = await this.levels(picture);
    const tile = await this.inQueue(() => renderIiif(this.files.accessCopy(picture), levels, request), signal);
    this.tiles.set(key, tile);
    return tile;
  }

  /** Does work with pixels when its turn comes. @throws {HttpProblem} 503 `busy` */
  inQueue<T>(work: () => Promise<T>, signal: AbortSignal): Promise<T> {
    if (this.queue.size >= MOST_WAITING) throw new HttpProblem(503, 'busy', 'Too many pictures are being waited for.');
    return this.queue.add(work, { signal }) as Promise<T>;
  }
}
