import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { TestApp } from './app.js';

/** A message as a mail program would show it. */
export interface ReadMail {
  /** by name in small letters, unfolded */
  readonly headers: ReadonlyMap<string, string>;
  readonly text: string;
  readonly html: string;
}

/** Sends what waits, then opens every `.eml` in the data folder, oldest first (ids sort by time). */
export async function openMailbox({ app, config }: TestApp): Promise<ReadMail[]> {
  await app.jobs.drain();
  const folder = join(config.dataDir, 'mail');
  return readdirSync(folder)
    .filter((name) => name.endsWith('.eml'))
    .sort()
    .map((name) => readMail(readFileSync(join(folder, name))));
}

/** The token of the newest mail's link, `…/reset/{token}` or `…/invitation/{token}`. */
export async function tokenInNewestMail(server: TestApp): Promise<string> {
  const mail = (await openMailbox(server)).at(-1);
  const token = mail?.text.match(/\/(?:reset|invitation)\/([\w-]+)/)?.[1];
  if (!token) throw new Error('The newest mail holds no link.');
  return token;
}

/** RFC 5322 headers and body; RFC 2045 transfer encodings; RFC 2046 multipart. Knows nothing of what wrote them. */
export function readMail(raw: Buffer): ReadMail {
  const message = readPart(raw.toString('latin1'));
  const boundary = message.headers.get('content-type')?.match(/boundary="([^"]+)"/)?.[1];
  const parts = boundary === undefined ? [message] : split(message.body, boundary).map(readPart);
  const bodyOf = (type: string): string => {
    const part = parts.find(({ headers }) => headers.get('content-type')?.startsWith(type));
    return part ? decode(part.body, part.headers.get('content-transfer-encoding') ?? '7bit') : '';
  };
  return { headers: message.headers, text: bodyOf('text/plain'), html: bodyOf('text/html') };
}

interface Part {
  readonly headers: ReadonlyMap<string, string>;
  readonly body: string;
}

function readPart(raw: string): Part {
  const end = raw.indexOf('\r\n\r\n');
  if (end < 0) throw new Error('No empty line (CRLF) between headers and body.');
  const unfolded = raw.slice(0, end).replace(/\r\n[ \t]+/g, ' ');
  const headers = unfolded.split('\r\n').map((line): [string, string] => {
    const colon = line.indexOf(':');
    return [line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim()];
  });
  return { headers: new Map(headers), body: raw.slice(end + 4) };
}

function split(body: string, boundary: string): string[] {
  const pieces = `\r\n${body}`.split(`\r\n--${boundary}`);
  if (!pieces.at(-1)?.startsWith('--')) throw new Error('The last part is not closed.');
  return pieces.slice(1, -1).map((piece) => piece.replace(/^[ \t]*\r\n/, ''));
}

function decode(body: string, encoding: string): string {
  switch (encoding.toLowerCase()) {
    case 'base64':
      return Buffer.from(body, 'base64').toString('utf8');
    case 'quoted-printable': {
      const bytes = body
        .replace(/=\r\n/g, '')
        .replace(/=([0-9A-F]{2})/gi, (_all, hex: string) => String.fromCharCode(parseInt(hex, 16)));
      return Buffer.from(bytes, 'latin1').toString('utf8');
    }
    case '7bit':
    case '8bit':
      return Buffer.from(body, 'latin1').toString('utf8');
    default:
      throw new Error(`Unknown transfer encoding ${encoding}.`);
  }
}
