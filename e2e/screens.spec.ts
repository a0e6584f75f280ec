import { AxeBuilder } from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { screensOf, signInAs } from './support/screens.js';

/*
 * Every screen of the demo, light and dark, wide and narrow: nothing that a screen reader or a weak eye stumbles
 * over (WCAG 2.2 AA as far as axe can tell), nothing wider than the screen, no error in the console, and no
 * request that leaves the machine.
 */
test.describe.configure({ mode: 'parallel' });

for (const colorScheme of ['light', 'dark'] as const) {
  for (const width of [1280, 390]) {
    test(`every screen is accessible and sound, ${colorScheme}, ${width} px`, async ({ browser, baseURL }) => {
      test.setTimeout(240_000);
      const own = baseURL ?? '';
      const photographer = await browser.newContext({ baseURL: own });
      await signInAs(photographer.request, 'photographer');
      const screens = await screensOf(photographer.request);
      await photographer.close();
      const faults: string[] = [];

      for (const role of new Set(screens.map(({ as }) => as))) {
        const context = await browser.newContext({
          baseURL: own,
          colorScheme,
          reducedMotion: 'reduce',
          viewport: { width, height: 844 },
        });
        if (role !== 'visitor') await signInAs(context.request, role);
        const page = await context.newPage();
        let at = '';
        page.on('console', (message) => {
          // a hidden find answers 404 on purpose, and the browser says so by itself
          if (message.type() === 'error' && !/status of 404/.test(message.text()))
            faults.push(`${at}: ${message.text()}`);
        });
        page.on('pageerror', (error) => faults.push(`${at}: ${error.message}`));
        page.on('request', (request) => {
          if (/^https?:/.test(request.url()) && !request.url().startsWith(own))
            faults.push(`${at}: asks ${request.url()}`);
        });
        for (const screen of screens.filter(({ as }) => as === role)) {
          at = screen.name;
          await page.goto(screen.path, { waitUntil: 'networkidle' });
          await expect(page.getByRole('heading').first()).toBeVisible();
          await screen.open?.(page);
          await page.waitForLoadState('networkidle');
          const { violations } = await new AxeBuilder({ page })
            .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
            .analyze();
          for (const { id, impact, nodes } of violations) {
            if (impact === 'serious' || impact === 'critical') {
              faults.push(`${at}: ${id} at ${nodes.map(({ target }) => target.join(' ')).join(', ')}`);
            }
          }
          const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
          if (overflow > 0) faults.push(`${at}: ${overflow} px wider than the screen`);
        }
        await context.close();
      }
      expect(faults).toEqual([]);
    });
  }
}
