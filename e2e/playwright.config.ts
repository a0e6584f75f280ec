import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from '@playwright/test';
import { CHROMIUM_ARGS, chromiumPath } from '../test/support/chromium.js';

const PORT = 3105;
// this file is loaded once per worker: the folder is made by the first and told to the others
process.env['E2E_DATA_DIR'] ??= mkdtempSync(join(tmpdir(), 'motebook-e2e-'));
/** a server that runs already, while a journey is being written */
const running = process.env['E2E_URL'];

/** Journeys in a real browser against the built server with the demo. `npm run build` comes first. */
export default defineConfig({
  testDir: '.',
  outputDir: '../test-results',
  timeout: 120_000,
  workers: 2,
  forbidOnly: process.env['CI'] !== undefined,
  expect: { timeout: 15_000 },
  use: {
    baseURL: running ?? `http://localhost:${PORT}`,
    viewport: { width: 1280, height: 800 },
    contextOptions: { reducedMotion: 'reduce' },
    trace: 'retain-on-failure',
    launchOptions: { executablePath: chromiumPath(), args: CHROMIUM_ARGS },
  },
  ...(running === undefined && {
    webServer: {
      command: 'node --enable-source-maps dist/node/server/main.js',
      cwd: fileURLToPath(new URL('..', import.meta.url)),
      url: `http://localhost:${PORT}/healthz`,
      timeout: 120_000,
      env: { PORT: String(PORT), DATA_DIR: process.env['E2E_DATA_DIR'], DEMO: 'on', LOG_LEVEL: 'warn' },
    },
  }),
});
