import type {} from 'passport';
import type { Request } from 'express';
import { type Actor, type Role, VISITOR } from '../../shared/permission/can.js';
import { NotSignedIn } from '../problem.js';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- how Express types are extended
  namespace Express {
    /** Who is signed in, as passport restores it. */
    interface User {
      id: string;
      role: Role;
      name: string;
      /** instant; null until the first visit */
      lastSeenAt: string | null;
    }
  }
}

/** Who asks. */
export function actorOf(req: Request): Actor {
  return req.user ? { kind: 'user', id: req.user.id, role: req.user.role } : VISITOR;
}

/**
 * The id of the person who asks, on routes that only signed-in people pass.
 * @throws {NotSignedIn}
 */
export function userIdOf(actor: Actor): string {
  if (actor.kind !== 'user') throw new NotSignedIn();
  return actor.id;
}
