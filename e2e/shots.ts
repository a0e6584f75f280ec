import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from '@playwright/test';
import { BuiltServer } from '../test/bench/support.js';
import { CHROMIUM_ARGS, chromiumPath, ensureChromium } from '../test/support/chromium.js';
import { screensOf, signInAs } from './support/screens.js';

/** `npm run shots [-- screen…]`: every screen at three widths, light and dark, into the ignored folder shots/. */
const folder = fileURLToPath(new URL('../shots', import.meta.url));
const WIDTHS = [390, 1280, 1920];
const wanted = process.argv.slice(2);

ensureChromium();
mkdirSync(folder, { recursive: true });
const server = await BuiltServer.open();
const browser = await chromium.launch({ executablePath: chromiumPath(), args: CHROMIUM_ARGS });
try {
  for (const role of ['visitor', 'photographer', 'identifier', 'editor', 'keeper'] as const) {
    for (const colorScheme of ['light', 'dark'] as const) {
      const context = await browser.newContext({ baseURL: server.url, colorScheme, reducedMotion: 'reduce' });
      await signInAs(context.request, 'photographer');
      const screens = (await screensOf(context.request)).filter(
        ({ as, name }) => as === role && (wanted.length === 0 || wanted.includes(name)),
      );
      await context.clearCookies();
      if (role !== 'visitor') await signInAs(context.request, role);
      for (const { name, path, open } of screens) {
        for (const width of WIDTHS) {
          const page = await context.newPage();
          await page.setViewportSize({ width, height: width === 390 ? 844 : 900 });
          await page.goto(path, { waitUntil: 'networkidle' });
          await open?.(page);
          await page.waitForLoadState('networkidle');
          await page.screenshot({ path: join(folder, `${name}-${width}-${colorScheme}.png`), fullPage: true });
          await page.close();
          process.stdout.write(`${name} ${width} ${colorScheme}\n`);
        }
      }
      await context.close();
    }
  }
} finally {
  await browser.close();
  await server.close();
}
