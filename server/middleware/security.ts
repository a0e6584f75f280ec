import { randomBytes } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';

/** The nonce of this answer's styles. */
export function nonceOf(res: Response): string {
  return (res.locals as { nonce: string }).nonce;
}

/** Content security: no inline script, styles by nonce, nothing from elsewhere. */
export function security({ https }: { https: boolean }): RequestHandler[] {
  return [
    (_req, res, next) => {
      (res.locals as { nonce: string }).nonce = randomBytes(16).toString('base64');
      next();
    },
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'self'"],
          baseUri: ["'self'"],
          objectSrc: ["'none'"],
          frameAncestors: ["'none'"],
          formAction: ["'self'"],
          scriptSrc: ["'self'"],
          scriptSrcAttr: ["'none'"],
          styleSrc: ["'self'", (_req, res) => `'nonce-${nonceOf(res as Response)}'`],
          styleSrcAttr: ["'unsafe-inline'"],
          imgSrc: ["'self'", 'blob:', 'data:'],
          fontSrc: ["'self'"],
          connectSrc: ["'self'"],
          workerSrc: ["'self'", 'blob:'],
          ...(https && { upgradeInsecureRequests: [] }),
        },
      },
      hsts: https,
      crossOriginResourcePolicy: { policy: 'same-origin' },
      referrerPolicy: { policy: 'same-origin' },
    }),
  ];
}
