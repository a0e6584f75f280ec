import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Config } from './config.js';

/** The session secret: as configured, or made once and kept in the data folder. */
export function sessionSecret(config: Pick<Config, 'sessionSecret' | 'dataDir'>): string {
  if (config.sessionSecret !== null) return config.sessionSecret;
  const file = join(config.dataDir, 'session-secret');
  try {
    return readFileSync(file, 'utf8').trim();
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
  }
  const secret = randomBytes(32).toString('hex');
  mkdirSync(config.dataDir, { recursive: true });
  writeFileSync(file, `${secret}\n`, { mode: 0o600, flag: 'wx' });
  return secret;
}
