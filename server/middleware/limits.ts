import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { HttpProblem } from '../problem.js';

/** How many tries are taken before the next one has to wait. */
export interface Limits {
  /** failed sign-ins with one e-mail address from one network address, in a quarter of an hour */
  readonly signIn: number;
  /** failed sign-ins from one network address, whatever the e-mail address, in a quarter of an hour */
  readonly signInAnywhere: number;
  /** links asked for to one e-mail address, from anywhere, in an hour: they fill somebody's mailbox */
  readonly askReset: number;
  /** links asked for from one network address, in an hour */
  readonly askResetAnywhere: number;
  /** failed tries of a link (a new password, an invitation) from one network address, in a quarter of an hour */
  readonly links: number;
}

/** A class-room behind one address must be able to sign in and mistype; a guessing machine must not get far. */
export const LIMITS: Limits = { signIn: 10, signInAnywhere: 100, askReset: 5, askResetAnywhere: 50, links: 50 };

const QUARTER_HOUR_MS = 15 * 60 * 1000;
const HOUR_MS = 4 * QUARTER_HOUR_MS;

export interface Limiters {
  readonly signIn: RequestHandler[];
  readonly askReset: RequestHandler[];
  readonly links: RequestHandler[];
}

/** Counts in memory: one process serves, and starting again forgives. */
export function limiters(limits: Limits): Limiters {
  return {
    signIn: [
      limiter({ most: limits.signInAnywhere, windowMs: QUARTER_HOUR_MS, key: network, failuresOnly: true }),
      limiter({
        most: limits.signIn,
        windowMs: QUARTER_HOUR_MS,
        key: (r) => `${network(r)} ${email(r)}`,
        failuresOnly: true,
      }),
    ],
    askReset: [
      limiter({ most: limits.askResetAnywhere, windowMs: HOUR_MS, key: network }),
      limiter({ most: limits.askReset, windowMs: HOUR_MS, key: email }),
    ],
    links: [limiter({ most: limits.links, windowMs: QUARTER_HOUR_MS, key: network, failuresOnly: true })],
  };
}

interface LimiterOptions {
  readonly most: number;
  readonly windowMs: number;
  readonly key: (req: Request) => string;
  readonly failuresOnly?: boolean;
}

function limiter({ most, windowMs, key, failuresOnly = false }: LimiterOptions): RequestHandler {
  return rateLimit({
    limit: most,
    windowMs,
    keyGenerator: key,
    skipSuccessfulRequests: failuresOnly,
    legacyHeaders: false,
    standardHeaders: false,
    handler: (req, res, next) => {
      const resetTime = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
      const leftMs = resetTime ? resetTime.getTime() - Date.now() : windowMs;
      const seconds = Math.max(1, Math.ceil(leftMs / 1000));
      res.set('Retry-After', String(seconds));
      next(new HttpProblem(429, 'too-many-tries', `Try again in ${seconds} s.`, { seconds }));
    },
  });
}

/** The asker's network: an IPv6 person owns a whole subnet, so the subnet counts as one. */
function network(req: Request): string {
  return ipKeyGenerator(req.ip ?? '');
}

function email(req: Request): string {
  const body: unknown = req.body;
  const given = typeof body === 'object' && body !== null && 'email' in body ? body.email : '';
  return typeof given === 'string' ? given.trim().toLowerCase().slice(0, 254) : '';
}
