import { createHash, randomBytes } from 'node:crypto';

/**
 * A secret that travels in a link. With its invitation or reset only the hash is kept; with 32 random bytes there
 * is nothing to guess, and a plain SHA-256 is enough (no salt, no slow hash). The outgoing mail, which the keeper's
 * desk shows, holds the link itself: until it was used or has lapsed, whoever reads the mail can use it.
 */
export interface Token {
  /** base64url, for the link */
  readonly token: string;
  /** SHA-256 of the token's text, hexadecimal, for the table */
  readonly hash: string;
}

export function newToken(): Token {
  const token = randomBytes(32).toString('base64url');
  return { token, hash: hashOf(token) };
}

export function hashOf(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
