import { isAbsolute, resolve } from 'node:path';
import * as z from 'zod/mini';

const port = z.coerce.number().check(z.int(), z.minimum(0), z.maximum(65535));
const megas = (most: number) => z.coerce.number().check(z.positive(), z.maximum(most));

const Environment = z.object({
  PORT: z._default(port, 3000),
  DATA_DIR: z._default(z.string().check(z.minLength(1)), 'data'),
  DEMO: z._default(z.enum(['on', 'off']), 'on'),
  SESSION_SECRET: z.optional(z.string().check(z.minLength(32))),
  PUBLIC_URL: z.optional(z.url({ protocol: /^https?$/ })),
  MAX_UPLOAD_MB: z._default(megas(20_000), 500),
  MAX_MEGAPIXELS: z._default(megas(2_000), 200),
  FIND_PREFIX: z._default(z.string().check(z.regex(/^[A-Z]{1,6}$/)), 'CW'),
  LOG_LEVEL: z._default(z.enum(['debug', 'info', 'warn', 'error', 'silent']), 'info'),
});

export interface Config {
  readonly port: number;
  /** absolute; database, originals, renditions, outgoing mail: all that must be kept */
  readonly dataDir: string;
  readonly demo: boolean;
  /** null: made once and kept in `dataDir` */
  readonly sessionSecret: string | null;
  /** without a trailing slash; what links in mails begin with */
  readonly publicUrl: string;
  readonly maxUploadBytes: number;
  readonly maxPixels: number;
  readonly findPrefix: string;
  readonly logLevel: 'debug' | 'info' | 'warn' | 'error' | 'silent';
}

/**
 * Parses the environment once.
 *
 * @throws {Error} naming each variable that is wrong and what it should be
 */
export function readConfig(env: Readonly<Record<string, string | undefined>>): Config {
  const present = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''));
  const parsed = Environment.safeParse(present);
  if (!parsed.success) {
    const lines = parsed.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`);
    throw new Error(`Motebook's settings in the environment are not right:\n${lines.join('\n')}`);
  }
  const e = parsed.data;
  return {
    port: e.PORT,
    dataDir: isAbsolute(e.DATA_DIR) ? e.DATA_DIR : resolve(e.DATA_DIR),
    demo: e.DEMO === 'on',
    sessionSecret: e.SESSION_SECRET ?? null,
    publicUrl: (e.PUBLIC_URL ?? `http://localhost:${e.PORT}`).replace(/\/+$/, ''),
    maxUploadBytes: Math.floor(e.MAX_UPLOAD_MB * 1024 * 1024),
    maxPixels: Math.floor(e.MAX_MEGAPIXELS * 1e6),
    findPrefix: e.FIND_PREFIX,
    logLevel: e.LOG_LEVEL,
  };
}
