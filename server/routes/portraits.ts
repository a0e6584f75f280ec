import type { Express, Request, RequestHandler, Response } from 'express';
import multer from 'multer';
import { sessionRoutes } from '../../shared/contracts/session.js';
import { userIdOf } from '../middleware/actor.js';
import { Invalid, NotFound } from '../problem.js';
import type { PortraitService } from '../services/portraits.js';
import type { Mount } from './mount.js';

const MOST_BYTES = 8 * 1024 * 1024;
const YEAR_MS = 365 * 24 * 60 * 60 * 1000;

/** The portrait: a small form in, a small picture out. */
export function mountPortraits(mount: Mount, app: Express, portraits: PortraitService): void {
  const receive = multer({
    dest: portraits.incoming,
    limits: { fileSize: MOST_BYTES, files: 1, fields: 0 },
    defParamCharset: 'utf8', // else names with letters beyond ASCII arrive garbled
  }).single('portrait');

  mount.route(sessionRoutes.savePortrait, async ({ actor, req, res }) => {
    await run(receive, req, res);
    if (!req.file) {
      throw new Invalid([{ pointer: '#/portrait', code: 'invalid_type', detail: 'A file named portrait is needed.' }]);
    }
    return portraits.save(userIdOf(actor), req.file.path, untilGone(res));
  });

  app.get('/portraits/:file', (req, res, next) => {
    const { file } = req.params;
    if (!/^[0-9a-f-]{36}\.webp$/.test(file)) throw new NotFound('portrait');
    res.sendFile(file, { root: portraits.folder, immutable: true, maxAge: YEAR_MS }, (error?: Error) => {
      if (error && !res.headersSent) next(new NotFound('portrait'));
    });
  });
}

function run(handler: RequestHandler, req: Request, res: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    void handler(req, res, (error?: unknown) => {
      if (error) reject(error as Error);
      else resolve();
    });
  });
}

/** Aborted when the client leaves before it has its answer. */
function untilGone(res: Response): AbortSignal {
  const gone = new AbortController();
  res.once('close', () => {
    if (!res.writableFinished) gone.abort();
  });
  return gone.signal;
}
