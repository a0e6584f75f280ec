import type { IncomingMessage, ServerResponse } from 'node:http';
import { readdir, readFile, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { FileStore } from '@tus/file-store';
import { Server } from '@tus/server';
import type { Logger } from 'pino';
import type { Clock } from '../clock.js';
import type { ImageTable } from '../db/images.js';
import { failPoint } from '../fail-points.js';
import { newId } from '../ids.js';
import { NotFound } from '../problem.js';
import type { Arrivals } from './arrivals.js';
import type { PictureFiles } from './picture-files.js';
import { roomIn, uploadProblem } from './upload-problem.js';

export const UPLOAD_PATH = '/api/uploads';
/** Unfinished uploads that nobody went on with go after this. */
const KEEP_UNFINISHED_MS = 7 * 24 * 60 * 60_000;
const UUID = /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/;

/** What stands beside an upload's bytes. */
interface UploadNotes {
  /** null while the client has not said */
  readonly size: number | null;
  readonly name: string;
  readonly ownerId: string;
}

/**
 * The library makes its folder in the constructor without anybody waiting for it, and ends the process when that
 * fails, as it does where the data folder is gone by then. `PictureFiles` has made the folder.
 */
class UploadStore extends FileStore {}
UploadStore.prototype['checkOrCreateDirectory'] = () => undefined; // private to the library's types, hence so

/**
 * Resumable uploads by the tus protocol. An upload's id becomes its picture's id. Whenever all bytes are
 * there the picture is brought in, be it at the last request, when the client asks how far it came, or at the
 * next start: a client that is told that everything arrived can rely on it.
 */
export class Uploads {
  private readonly tus: Server;
  private readonly finishing = new Map<string, Promise<void>>();

  constructor(
    private readonly options: {
      readonly files: PictureFiles;
      readonly arrivals: Arrivals;
      readonly images: ImageTable;
      readonly maxBytes: number;
      readonly clock: Clock;
      readonly log: Logger;
    },
  ) {
    const { files, maxBytes, log } = options;
    this.tus = new Server({
      path: UPLOAD_PATH,
      relativeLocation: true,
      allowedOrigins: () => false, // our own pages alone
      maxSize: maxBytes,
      datastore: new UploadStore({ directory: files.uploads, expirationPeriodInMilliseconds: KEEP_UNFINISHED_MS }),
      namingFunction: () => newId(),
      onUploadCreate: (req, upload) => {
        const { user } = req.runtime?.node?.req as IncomingMessage & { user?: Express.User };
        if (!user) throw new Error('Uploads are for signed-in people.'); // the route has asked already
        return Promise.resolve({ metadata: { filename: upload.metadata?.['filename'] ?? null, ownerId: user.id } });
      },
      onUploadFinish: async (_req, { id }) => {
        await this.finish(id);
        return {};
      },
      onResponseError: async (_req, error) => {
        const problem = uploadProblem(error, await roomIn(files.uploads));
        if (problem) log.error({ err: error, status: problem.status_code }, 'an upload failed');
        return problem ?? undefined;
      },
    });
  }

  /** Answers a request of the protocol; the route has made sure that the person may. */
  handle(req: IncomingMessage, res: ServerResponse): Promise<void> {
    takeCallbackAlone(res);
    return this.tus.handle(req, res);
  }

  /**
   * Whether all bytes of this upload have arrived and are kept as a picture.
   *
   * @returns how many bytes when they have; null while the upload goes on
   * @throws {NotFound} for other people's uploads too
   */
  async whole(id: string, personId: string): Promise<number | null> {
    if (!UUID.test(id)) throw new NotFound('upload');
    const notes = await this.notes(id);
    if (notes && notes.ownerId !== personId) throw new NotFound('upload');
    if (notes && !(await this.isWhole(id, notes)) && (await this.arrived(id)) !== null) return null;
    if (notes) await this.finish(id);
    const image = await this.options.images.find(id);
    if (image?.ownerId !== personId) throw new NotFound('upload');
    return image.bytes;
  }

  /** After a start: brings in what had arrived when the server ended, and clears what is left of it. */
  async recover(): Promise<void> {
    for (const id of await this.noted()) {
      const notes = await this.notes(id);
      if (notes && ((await this.arrived(id)) === null || (await this.isWhole(id, notes)))) {
        await this.finish(id).catch((error: unknown) => {
          this.options.log.error({ err: error, upload: id }, 'an upload that had arrived could not be brought in');
        });
      }
    }
  }

  /** Removes unfinished uploads, and strays, that nobody has touched for a week. */
  async expire(): Promise<void> {
    const { files, clock } = this.options;
    const cutoff = clock.now().getTime() - KEEP_UNFINISHED_MS;
    for (const name of await readdir(files.uploads)) {
      const bytes = join(files.uploads, name.replace(/\.json$/, ''));
      const touched = (await modified(bytes)) ?? (await modified(join(files.uploads, name)));
      if (touched !== null && touched < cutoff) await rm(join(files.uploads, name), { force: true });
    }
  }

  /** Once per upload at a time. */
  private finish(id: string): Promise<void> {
    const running = this.finishing.get(id);
    if (running) return running;
    const work = this.bringIn(id).finally(() => this.finishing.delete(id));
    this.finishing.set(id, work);
    return work;
  }

  private async bringIn(id: string): Promise<void> {
    const { arrivals, images, files } = this.options;
    const notes = await this.notes(id);
    if (!notes) return; // finished before
    const path = join(files.uploads, id);
    if ((await this.arrived(id)) !== null)
      await arrivals.arrive({ id, path, name: notes.name, ownerId: notes.ownerId });
    else if (!(await images.find(id))) throw new NotFound('upload');
    // the picture is written down and has the bytes under their own name
    await rm(path, { force: true });
    failPoint('upload:cleared');
    await rm(`${path}.json`, { force: true });
  }

  private async isWhole(id: string, notes: UploadNotes): Promise<boolean> {
    return notes.size !== null && (await this.arrived(id)) === notes.size;
  }

  /** bytes so far; null when the file is gone */
  private async arrived(id: string): Promise<number | null> {
    try {
      return (await stat(join(this.options.files.uploads, id))).size;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
      throw error;
    }
  }

  private async noted(): Promise<string[]> {
    const names = await readdir(this.options.files.uploads);
    return names
      .filter((name) => name.endsWith('.json'))
      .map((name) => name.slice(0, -'.json'.length))
      .sort();
  }

  /** null for none, and for notes that a cut left torn: nothing of such an upload was acknowledged */
  private async notes(id: string): Promise<UploadNotes | null> {
    try {
      const stored = JSON.parse(await readFile(join(this.options.files.uploads, `${id}.json`), 'utf8')) as {
        size?: number;
        metadata?: { filename?: string | null; ownerId?: string };
      };
      const ownerId = stored.metadata?.ownerId;
      if (ownerId === undefined) return null;
      return { size: stored.size ?? null, name: stored.metadata?.filename ?? '', ownerId };
    } catch (error) {
      if (error instanceof SyntaxError || (error as NodeJS.ErrnoException).code === 'ENOENT') return null;
      throw error;
    }
  }
}

async function modified(path: string): Promise<number | null> {
  try {
    return (await stat(path)).mtimeMs;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  }
}

/**
 * Lets `res.end(callback)` be said. Node takes it, but the session's and the compression's own `end` would take
 * the callback for the last bytes.
 */
function takeCallbackAlone(res: ServerResponse): void {
  const end = res.end.bind(res) as (chunk?: unknown, encoding?: unknown, done?: unknown) => ServerResponse;
  res.end = ((chunk?: unknown, encoding?: unknown, done?: unknown) => {
    if (typeof chunk !== 'function') return end(chunk, encoding, done);
    res.once('close', chunk as () => void);
    return end();
  }) as ServerResponse['end'];
}
