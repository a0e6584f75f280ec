import { expect, type Page, test } from '@playwright/test';
import { BODIES, type Body, micrograph, TRUE_UM_PER_PX } from '../test/support/field-pictures.js';
import { BenchPage, pictureInFind, pixelsOf, setReference } from './support/bench-page.js';
import { PictureOnScreen, placeInScreenshot } from './support/picture-on-screen.js';
import { signInAs } from './support/screens.js';

test.use({ viewport: { width: 1920, height: 1080 } });

const REFERENCE = { lengthPx: 280, lengthUm: 280 * TRUE_UM_PER_PX };
/** µm by which a drawn size may be off: half a pixel at each end of the drag. */
const POINTING_UM = 0.25;

/** Ends of a body's two axes, image px. */
const endsOf = ({ x, y, length, width }: Body) => ({
  along: [
    { x: x - length / 2, y },
    { x: x + length / 2, y },
  ] as const,
  across: [
    { x, y: y - width / 2 },
    { x, y: y + width / 2 },
  ] as const,
});
const trueSize = ({ length, width }: Body) => [length * TRUE_UM_PER_PX, width * TRUE_UM_PER_PX] as const;
/** '8.50 ± 0.18 µm along, 6.00 ± …' in figures. */
const sizesIn = (text: string) => [...text.matchAll(/([\d.]+)\s±/g)].map((match) => Number(match[1]));

function expectSizes(text: string, body: Body): void {
  const sizes = sizesIn(text);
  expect(sizes).toHaveLength(2);
  trueSize(body).forEach((size, i) => expect(Math.abs((sizes[i] ?? 0) - size)).toBeLessThan(POINTING_UM));
}

async function scaledPicture(page: Page, name: string): Promise<string> {
  await signInAs(page.request, 'photographer');
  const imageId = await pictureInFind(page.request, name, await micrograph());
  await setReference(page.request, imageId, REFERENCE);
  return imageId;
}

test('three spores: by mouse, by keyboard, and by touch', async ({ browser, baseURL }) => {
  const context = await browser.newContext({
    baseURL: baseURL ?? '',
    viewport: { width: 1920, height: 1080 },
    hasTouch: true,
  });
  const page = await context.newPage();
  const bench = await new BenchPage(page).open(await scaledPicture(page, 'three-ways.tif'));
  const [first, second, third] = BODIES as [Body, Body, Body];

  await test.step('by mouse: along, then across', async () => {
    await bench.take(/^Spore/);
    const picture = await PictureOnScreen.within(bench.surface);
    await picture.drag(...endsOf(first).along);
    await picture.drag(...endsOf(first).across);
    await expect.poll(async () => sizesIn((await bench.measured())[0] ?? '')).toHaveLength(2);
    expectSizes((await bench.measured())[0] ?? '', first);
  });

  await test.step('by keyboard: a cross-hair, moved and set', async () => {
    const press = async (key: string, times: number) => {
      for (let i = 0; i < times; i++) await page.keyboard.press(key);
    };
    await bench.surface.focus();
    // the first arrow shows the cross-hair in the middle of the picture, at 160, 106
    await press('ArrowLeft', 1 + 6);
    await press('Shift+ArrowDown', 2);
    await press('ArrowDown', 4);
    await press('Space', 1);
    await press('Shift+ArrowRight', 3);
    await press('ArrowRight', 2);
    await press('Space', 1);
    await press('ArrowLeft', 16);
    await press('ArrowUp', 13);
    await press('Space', 1);
    await press('ArrowDown', 26);
    await press('Enter', 1);
    await expect.poll(async () => sizesIn((await bench.measured())[1] ?? '')).toHaveLength(2);
    expectSizes((await bench.measured())[1] ?? '', second);
    await page.keyboard.press('Escape');
  });

  await test.step('by touch: one finger draws, two don’t', async () => {
    await bench.take(/^Spore/);
    const picture = await PictureOnScreen.within(bench.surface);
    const touch = await context.newCDPSession(page);
    const send = (type: 'touchStart' | 'touchMove' | 'touchEnd', ...points: { x: number; y: number }[]) =>
      touch.send('Input.dispatchTouchEvent', { type, touchPoints: points.map(({ x, y }, id) => ({ x, y, id })) });
    for (const [from, to] of [endsOf(third).along, endsOf(third).across]) {
      await send('touchStart', picture.at(from));
      await send('touchMove', picture.at(to));
      await send('touchEnd');
    }
    await expect.poll(async () => sizesIn((await bench.measured())[2] ?? '')).toHaveLength(2);
    expectSizes((await bench.measured())[2] ?? '', third);

    const [a, b] = [picture.at({ x: 100, y: 100 }), picture.at({ x: 200, y: 100 })];
    await send('touchStart', a);
    await send('touchMove', { x: a.x + 4, y: a.y });
    await send('touchStart', { x: a.x + 4, y: a.y }, b);
    await send('touchMove', { x: a.x + 60, y: a.y }, { x: b.x - 60, y: b.y });
    await send('touchEnd');
    await bench.settled();
    expect((await placeInScreenshot(await bench.surface.screenshot({ scale: 'css' }))).zoom.x).toBeLessThan(
      picture.zoom.x * 0.9,
    );
    expect(await bench.measured()).toHaveLength(3);
  });

  await test.step('undo takes one gesture back, redo brings it again, a reload keeps it', async () => {
    await page.keyboard.press('Control+z');
    await expect.poll(async () => sizesIn((await bench.measured())[2] ?? '')).toHaveLength(1);
    await page.keyboard.press('Control+Shift+z');
    await expect.poll(async () => sizesIn((await bench.measured())[2] ?? '')).toHaveLength(2);
    await bench.settled();
    const before = await bench.measured();
    await page.reload();
    await bench.settled();
    expect(await bench.measured()).toEqual(before);
    await expect(page.getByRole('row', { name: /^along/ })).toContainText('3');
  });
  await context.close();
});

for (const density of [1, 2]) {
  test(`what is drawn and the bar stay on the picture at every zoom, ${density} device pixels to one`, async ({
    browser,
    baseURL,
  }) => {
    const context = await browser.newContext({
      baseURL: baseURL ?? '',
      viewport: { width: 1920, height: 1080 },
      deviceScaleFactor: density,
      reducedMotion: 'reduce',
    });
    const page = await context.newPage();
    const bench = await new BenchPage(page).open(await scaledPicture(page, `in-step-${density}.tif`));
    await bench.take(/^Thread/);
    const [from, to] = [
      { x: 60, y: 160 },
      { x: 230, y: 160 },
    ];
    await (await PictureOnScreen.within(bench.surface)).drag(from, to);
    await expect.poll(() => bench.measured()).toHaveLength(1);

    const inStep = async () => {
      await bench.atRest();
      await bench.settled();
      const png = await bench.surface.screenshot({ scale: 'css' });
      const { zoom, origin } = await placeInScreenshot(png);
      const pixels = await pixelsOf(png);
      const isMark = (x: number, y: number) => {
        const [r, g, b] = pixels.at(x, y);
        return r > 150 && r - b > 50 && g < 230;
      };
      // the strokes that close the line at both ends stand out above it
      const row = Math.round(origin.y + from.y * zoom.y - 3);
      // without the edge, where the ring of the keyboard's focus stands
      const columns = Array.from({ length: pixels.width }, (_, x) => x).filter(
        (x) => x > 4 && x < pixels.width - 5 && isMark(x, row),
      );
      const expected = [from, to].map(({ x }) => origin.x + x * zoom.x);
      const middle = (xs: number[]) => xs.reduce((sum, x) => sum + x + 0.5, 0) / xs.length;
      const half = (expected[0]! + expected[1]!) / 2;
      const seen = [middle(columns.filter((x) => x < half)), middle(columns.filter((x) => x > half))];
      // where the drag was let go is known to half a CSS pixel at the zoom of the drawing
      seen.forEach((x, i) => expect(Math.abs(x - expected[i]!)).toBeLessThan(1.25));

      const label = await page.locator('app-bench-picture app-scale-bar .label').innerText();
      const um = Number(label.replace(/[^\d.]/g, ''));
      const bar = longestWhiteRun(pixels, 0, Math.round(pixels.height * 0.7));
      expect(Math.abs(bar - (um / TRUE_UM_PER_PX) * zoom.x)).toBeLessThan(1.5);
      expect(bar).toBeLessThanOrEqual(pixels.width / 4 + 1);
      return zoom.x;
    };

    const fitted = await inStep();
    await page.keyboard.press('-');
    const farther = await inStep();
    expect(farther).toBeLessThan(fitted * 0.75);
    await bench.surface.hover({ position: { x: 500, y: 400 } });
    await page.mouse.wheel(0, 60);
    await inStep();
    await bench.surface.hover({ position: { x: 500, y: 400 } });
    await page.mouse.down({ button: 'middle' });
    await page.mouse.move(640, 480, { steps: 3 });
    await page.mouse.up({ button: 'middle' });
    await inStep();
    await page.setViewportSize({ width: 1501, height: 907 });
    await page.keyboard.press('0');
    await inStep();
    await context.close();
  });
}

/** The longest row of pure white from a column and row on: an open bar's own edge. */
function longestWhiteRun(pixels: Awaited<ReturnType<typeof pixelsOf>>, fromX: number, fromY: number): number {
  let longest = 0;
  for (let y = fromY; y < pixels.height; y++) {
    let run = 0;
    for (let x = fromX; x < pixels.width / 2; x++) {
      run = pixels.at(x, y).every((value) => value > 250) ? run + 1 : 0;
      longest = Math.max(longest, run);
    }
  }
  return longest;
}

test('an end that was put wrong is dragged right, and nudged by the keyboard', async ({ page }) => {
  const bench = await new BenchPage(page).open(await scaledPicture(page, 'mended.tif'));
  await bench.take(/^Thread/);
  const picture = await PictureOnScreen.within(bench.surface);
  const length = async () => sizesIn((await bench.measured())[0] ?? '')[0] ?? 0;
  await picture.drag({ x: 60, y: 160 }, { x: 230, y: 160 });
  await expect.poll(length).toBeCloseTo(170 * TRUE_UM_PER_PX, 0);
  await page.keyboard.press('Escape');
  await picture.drag({ x: 230, y: 160 }, { x: 250, y: 160 });
  await expect.poll(length).toBeCloseTo(190 * TRUE_UM_PER_PX, 0);
  const dragged = await length();
  for (let i = 0; i < 8; i++) await page.keyboard.press('ArrowLeft');
  await expect.poll(async () => (await length()) - dragged).toBeCloseTo(-8 * TRUE_UM_PER_PX, 1);
  await page.keyboard.press('Shift+ArrowRight');
  await expect.poll(async () => (await length()) - dragged).toBeCloseTo(2 * TRUE_UM_PER_PX, 1);
  // one key press is one edit: undone one by one
  await page.keyboard.press('Control+z');
  await expect.poll(async () => (await length()) - dragged).toBeCloseTo(-8 * TRUE_UM_PER_PX, 1);
  await page.keyboard.press('Delete');
  await expect.poll(async () => (await bench.measured()).length).toBe(0);
  await bench.settled();
});

test('what could not be sent is kept in the browser, and goes out after a reload', async ({ page }) => {
  const bench = await new BenchPage(page).open(await scaledPicture(page, 'offline.tif'));
  await page.route('**/note-edits', (route) => route.abort());
  await bench.take(/^Point at it/);
  await (await PictureOnScreen.within(bench.surface)).click({ x: 200, y: 60 });
  await page.getByRole('textbox', { name: 'What is said' }).fill('a wall with a seam');
  await page.keyboard.press('Enter');
  await expect(page.getByText(/not kept yet: no connection/)).toBeVisible();

  page.on('dialog', (dialog) => void dialog.accept());
  await page.unroute('**/note-edits');
  await page.reload();
  await bench.settled();
  await expect(bench.kept).toBeVisible();
  await expect(page.getByRole('button', { name: /a wall with a seam/ })).toBeVisible();
  const notes = (await (await page.request.get(`/api/images/${page.url().split('/').pop()}/notes`)).json()) as {
    notes: { text: string }[];
  };
  expect(notes.notes.map(({ text }) => text)).toEqual(['a wall with a seam']);
});

test('two people draw on one picture at once, and each sees both', async ({ page, browser, baseURL }) => {
  const imageId = await scaledPicture(page, 'two-writers.tif');
  const context = await browser.newContext({ baseURL: baseURL ?? '', viewport: { width: 1920, height: 1080 } });
  const other = await context.newPage();
  await signInAs(other.request, 'identifier');
  const benches = [await new BenchPage(page).open(imageId), await new BenchPage(other).open(imageId)];
  await Promise.all(
    benches.map(async (bench, i) => {
      await bench.take(/^Point at it/);
      await (await PictureOnScreen.within(bench.surface)).click({ x: 90 + 120 * i, y: 60 });
      await bench.page.getByRole('textbox', { name: 'What is said' }).fill(i === 0 ? 'said by Imre' : 'said by Maud');
      await bench.page.keyboard.press('Enter');
    }),
  );
  for (const bench of benches) {
    await expect(bench.page.getByRole('button', { name: /said by Imre/ })).toBeVisible();
    await expect(bench.page.getByRole('button', { name: /said by Maud/ })).toBeVisible();
  }
  // another's note is read, and neither worded nor taken away
  await other.getByRole('button', { name: /said by Imre/ }).click();
  await expect(other.getByRole('textbox', { name: 'What is said' })).toBeHidden();
  await context.close();
});

test('a visitor reads, and has nothing to draw with', async ({ page, browser, baseURL }) => {
  const imageId = await scaledPicture(page, 'visited.tif');
  const context = await browser.newContext({ baseURL: baseURL ?? '' });
  const visitor = await context.newPage();
  await new BenchPage(visitor).open(imageId);
  await expect(visitor.getByRole('link', { name: 'Sign in' })).toBeVisible();
  await expect(visitor.getByRole('button', { name: /^Point at it/ })).toHaveCount(0);
  await expect(visitor.getByRole('button', { name: 'Undo' })).toHaveCount(0);
  await context.close();
});
