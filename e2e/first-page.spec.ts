import { expect, test } from '@playwright/test';

/* The first page as a visitor gets it: readable before any script has run, and nothing done on it is lost. */

test('the gallery is there without any script', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ ...(baseURL && { baseURL }), javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto('/');
  await expect(page.getByRole('link', { name: /Hemitrichia clavata/ }).first()).toBeVisible();
  await page.getByRole('searchbox').fill('galericulata');
  await page.getByRole('searchbox').press('Enter');
  await expect(page).toHaveURL(/q=galericulata/);
  await expect(page.getByText(/galericulata/).first()).toBeVisible();
  await context.close();
});

test('words typed before the page has woken up are searched all the same', async ({ page }) => {
  let wake = (): void => undefined;
  const awake = new Promise<void>((resolve) => (wake = resolve));
  await page.route(/(main|chunk|polyfills)-[^/]*\.js$/, async (route) => {
    await awake;
    await route.continue();
  });
  await page.goto('/', { waitUntil: 'commit' });
  await page.getByRole('combobox', { name: /taxon/i }).fill('hemitrichia');
  wake();
  await page
    .getByRole('option', { name: /Hemitrichia clavata/ })
    .first()
    .click();
  await expect(page).toHaveURL(/taxon=/);
});

test('the first page brings less than 250 KB of script, compressed', async ({ page }) => {
  const scripts: Promise<number>[] = [];
  page.on('requestfinished', (request) => {
    if (request.resourceType() === 'script')
      scripts.push(request.sizes().then(({ responseBodySize }) => responseBodySize));
  });
  await page.goto('/', { waitUntil: 'networkidle' });
  const bytes = (await Promise.all(scripts)).reduce((sum, size) => sum + size, 0);
  expect(scripts.length).toBeGreaterThan(0);
  expect(bytes).toBeLessThan(250_000);
});

test('what the server rendered wakes up as it stands: nothing is fetched or drawn again', async ({ page }) => {
  const asked: string[] = [];
  page.on('request', (request) => {
    const { pathname } = new URL(request.url());
    if (pathname.startsWith('/api/')) asked.push(pathname);
  });
  await page.route(/(main|chunk|polyfills)-[^/]*\.js$/, async (route) => {
    await expect(page.locator('main img').first()).toBeVisible();
    await page.locator('main img').evaluateAll((pictures) => pictures.forEach((one) => (one.ariaLabel = 'rendered')));
    await route.continue();
  });
  await page.goto('/', { waitUntil: 'networkidle' });
  expect(asked).toEqual(['/api/session']);
  const pictures = page.locator('main img');
  expect(await pictures.count()).toBeGreaterThan(0);
  for (const picture of await pictures.all()) await expect(picture).toHaveAttribute('aria-label', 'rendered');
});
