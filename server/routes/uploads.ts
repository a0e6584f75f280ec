import type { Express } from 'express';
import { can } from '../../shared/permission/can.js';
import { type Clock, today } from '../clock.js';
import { actorOf } from '../middleware/actor.js';
import { HttpProblem, NotSignedIn } from '../problem.js';
import { UPLOAD_PATH, type Uploads } from '../pictures/uploads.js';

/**
 * Resumable uploads. They speak tus instead of JSON and so have no contract: POST makes an upload, PATCH goes on
 * with it, HEAD tells how far it came, DELETE drops it. All but HEAD need the XSRF header; an upload exists
 * only for the person who made it.
 */
export function mountUploads(
  app: Express,
  { uploads, maxBytes, clock }: { uploads: Uploads; maxBytes: number; clock: Clock },
): void {
  app.all(`${UPLOAD_PATH}{/:uploadId}`, async (req, res) => {
    const actor = actorOf(req);
    if (actor.kind !== 'user' || !can(actor, 'site.contribute', { kind: 'site' }, today(clock)))
      throw new NotSignedIn();
    if (Number(req.get('Upload-Length') ?? 0) > maxBytes) {
      throw new HttpProblem(413, 'too-large', 'The file is larger than accepted.', {
        mostMegabytes: Math.floor(maxBytes / 1024 ** 2),
      });
    }
    const { uploadId } = req.params as { uploadId?: string };
    const arrived = uploadId === undefined ? null : await uploads.whole(uploadId, actor.id);
    if (arrived !== null) {
      // all of it is kept as a picture; the client may not have heard so before its connection broke
      res.set({ 'Tus-Resumable': '1.0.0', 'Cache-Control': 'no-store' });
      res.set({ 'Upload-Offset': String(arrived), 'Upload-Length': String(arrived) });
      res.status(req.method === 'HEAD' ? 200 : req.method === 'PATCH' ? 409 : 404).end();
      return;
    }
    // the protocol's server ends the connection of a body it has read; said beforehand, nobody sends the next part into it
    if (req.method === 'PATCH' || req.method === 'POST') res.set('Connection', 'close');
    await uploads.handle(req, res);
  });
}
