import type { Request } from 'express';
import type { Passport } from 'passport';
import { sessionRoutes } from '../../shared/contracts/session.js';
import { userIdOf } from '../middleware/actor.js';
import type { Xsrf } from '../middleware/xsrf.js';
import { HttpProblem } from '../problem.js';
import type { InvitationService } from '../services/invitations.js';
import type { PasswordResetService } from '../services/password-resets.js';
import type { PeopleService } from '../services/people.js';
import type { Mount } from './mount.js';

export interface SessionServices {
  readonly people: PeopleService;
  readonly resets: PasswordResetService;
  readonly invitations: InvitationService;
  readonly passport: InstanceType<typeof Passport>;
  readonly xsrf: Xsrf;
}

/** Signing in and out, coming in by invitation, a forgotten password, the own profile. */
export function mountSession(mount: Mount, services: SessionServices): void {
  const { people, resets, invitations, passport, xsrf } = services;
  mount.route(sessionRoutes.read, ({ req, res }) => {
    xsrf.give(req, res);
    return people.session(req.user?.id ?? null);
  });

  mount.route(sessionRoutes.signIn, async ({ req, res }) => {
    const user = await authenticate(passport, req);
    if (!user) throw new HttpProblem(401, 'wrong-sign-in', 'No person has this e-mail address and password.');
    await logIn(req, user); // passport makes a new session id
    xsrf.give(req, res, { fresh: true });
    return people.session(user.id);
  });

  mount.route(sessionRoutes.signOut, async ({ req, res }) => {
    await new Promise<void>((resolve, reject) => {
      req.logout((error: unknown) => {
        if (error) reject(error as Error);
        else resolve();
      });
    });
    xsrf.give(req, res, { fresh: true });
  });

  mount.route(sessionRoutes.askReset, ({ body }) => resets.ask(body.email));
  mount.route(sessionRoutes.reset, ({ body, req }) => resets.reset(body, req.sessionID));

  mount.route(sessionRoutes.readInvitation, ({ params }) => invitations.read(params['token'] ?? ''));
  mount.route(sessionRoutes.accept, async ({ body, req, res }) => {
    const user = await invitations.accept(body);
    await logIn(req, user);
    xsrf.give(req, res, { fresh: true });
    return people.session(user.id);
  });

  mount.route(sessionRoutes.saveProfile, ({ actor, body }) => people.saveProfile(userIdOf(actor), body));
}

function authenticate(passport: InstanceType<typeof Passport>, req: Request): Promise<Express.User | null> {
  return new Promise((resolve, reject) => {
    const handler = passport.authenticate('local', (error: unknown, user: Express.User | false) => {
      if (error) reject(error as Error);
      else resolve(user || null);
    }) as (req: Request, res: unknown, next: (error: unknown) => void) => void;
    handler(req, null, reject);
  });
}

export function logIn(req: Request, user: Express.User): Promise<void> {
  return new Promise((resolve, reject) => {
    req.logIn(user, (error: unknown) => {
      if (error) reject(error as Error);
      else resolve();
    });
  });
}
