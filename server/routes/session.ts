import type { Request } from 'express';
import type { Passport } from 'passport';
import { sessionRoutes } from '../../shared/contracts/session.js';
import type { Xsrf } from '../middleware/xsrf.js';
import { HttpProblem } from '../problem.js';
import type { PeopleService } from '../services/people.js';
import type { Mount } from './mount.js';

export function mountSession(
  mount: Mount,
  { people, passport, xsrf }: { people: PeopleService; passport: InstanceType<typeof Passport>; xsrf: Xsrf },
): void {
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
