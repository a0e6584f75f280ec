import type { Request, RequestHandler, Response } from 'express';
import { doubleCsrf } from 'csrf-csrf';

/** Angular's own convention: a readable cookie, sent back as a header by whatever runs on our origin. */
export const XSRF_COOKIE = 'XSRF-TOKEN';
export const XSRF_HEADER = 'x-xsrf-token';

export interface Xsrf {
  /** refuses requests that change something and carry no valid token */
  readonly protect: RequestHandler;
  /** sets the cookie; after signing in or out `fresh` replaces it, since it belongs to the session */
  give(req: Request, res: Response, options?: { fresh?: boolean }): void;
}

export function xsrf({ secret, secure }: { secret: string; secure: boolean }): Xsrf {
  const { doubleCsrfProtection, generateCsrfToken } = doubleCsrf({
    getSecret: () => secret,
    getSessionIdentifier: (req) => (req.user ? req.sessionID : 'visitor'),
    cookieName: XSRF_COOKIE,
    cookieOptions: { httpOnly: false, sameSite: 'lax', path: '/', secure },
    getCsrfTokenFromRequest: (req) => req.get(XSRF_HEADER),
  });
  return {
    protect: doubleCsrfProtection,
    give(req, res, { fresh = false } = {}) {
      generateCsrfToken(req, res, { overwrite: fresh, validateOnReuse: false });
    },
  };
}
