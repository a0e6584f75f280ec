import type { RequestHandler } from 'express';
import type { PeopleService } from '../services/people.js';

/** Notes when a signed-in person was last here. */
export function seen(people: PeopleService): RequestHandler {
  return async (req, _res, next) => {
    if (req.user) await people.seen(req.user);
    next();
  };
}
