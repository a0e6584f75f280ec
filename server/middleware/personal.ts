import type { RequestHandler } from 'express';

/**
 * What the API answers depends on who asks, and may be hidden a moment later: nobody but the asker's own browser
 * keeps it, and that asks each time. Routes that know better say so themselves.
 */
export const personal: RequestHandler = (_req, res, next) => {
  res.set('Cache-Control', 'private, no-cache');
  next();
};
