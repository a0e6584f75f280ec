import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';

/** What Chromium needs to run headless, as root, on a machine without a network. */
export const CHROMIUM_ARGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** The browser for tests and screenshots: `CHROME_BIN`, or where Debian puts it. */
export function chromiumPath(): string {
  return process.env['CHROME_BIN'] ?? '/usr/bin/chromium';
}

/**
 * Sees to it that there is a browser: installs Debian's when this is root on Debian.
 *
 * @throws {Error} that says how to get one
 */
export function ensureChromium(): void {
  if (existsSync(chromiumPath())) return;
  if (process.getuid?.() === 0 && existsSync('/etc/debian_version') && process.env['CHROME_BIN'] === undefined) {
    const options = { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } } as const;
    execFileSync('apt-get', ['update', '-qq'], options);
    execFileSync('apt-get', ['install', '-y', '-qq', 'chromium'], options);
    if (existsSync(chromiumPath())) return;
  }
  throw new Error(
    `No browser at ${chromiumPath()}. Install Chromium (on Debian: apt-get install chromium) or name one in CHROME_BIN.`,
  );
}
