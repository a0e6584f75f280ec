import { noteRoutes } from '../../shared/contracts/notes.js';
import { userIdOf } from '../middleware/actor.js';
import type { NoteService } from '../services/notes.js';
import type { Mount } from './mount.js';

export function mountNotes(mount: Mount, { notes }: { notes: NoteService }): void {
  mount.route(noteRoutes.read, ({ params }) => notes.read(params['imageId'] ?? ''));
  mount.route(noteRoutes.since, ({ actor, params, query }) => notes.since(actor, params['imageId'] ?? '', query.after));
  mount.route(noteRoutes.push, ({ actor, params, body }) => notes.push(userIdOf(actor), params['imageId'] ?? '', body));
}
