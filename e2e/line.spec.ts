import { readFile } from 'node:fs/promises';
import { expect, type Locator, type Page, test } from '@playwright/test';
import {
  BODIES,
  FRAME,
  GRADUATIONS,
  micrograph,
  photograph,
  stageMicrometer,
  TRUE_UM_PER_PX,
} from '../test/support/field-pictures.js';
import { readBar } from '../test/support/bar-ruler.js';
import { PictureOnScreen } from './support/picture-on-screen.js';

/*
 * The main job, end to end, on files that the application has never seen: from three files to a picture in the
 * gallery whose bar is right. Everything is done as a person does it, by what stands on the screen.
 */
// wide enough for four screen pixels per image pixel beside the calibration's panel
test.use({ viewport: { width: 2700, height: 1500 } });

/** The find's pictures, as links to the bench: those of the find, then its scale references. */
const picturesOf = (page: Page): Locator =>
  page.getByRole('region', { name: 'Observations' }).locator('a[href^="/images/"]');

/** The deep-zoomed picture at rest. */
const onScreen = (page: Page): Promise<PictureOnScreen> => PictureOnScreen.atRest(page.getByRole('application'));

test('from a photograph, a micrograph and a stage micrometer to a named picture with its bar', async ({
  page,
  browser,
  baseURL,
}) => {
  const files = [
    { name: 'log.jpg', mimeType: 'image/jpeg', buffer: await photograph() },
    { name: 'spores.tif', mimeType: 'image/tiff', buffer: await micrograph() },
    { name: 'micrometer.jpg', mimeType: 'image/jpeg', buffer: await stageMicrometer() },
  ];
  let findUrl = '';

  await test.step('she signs in', async () => {
    await page.goto('/sign-in');
    await page.getByRole('button', { name: /Imre Waddell/ }).click();
    await expect(page).not.toHaveURL(/sign-in/);
  });

  await test.step('uploads three files, and the tray reads date and camera from them', async () => {
    await page.goto('/desk/tray');
    await page.locator('input[type=file]').setInputFiles(files);
    for (const { name } of files) await expect(page.getByRole('gridcell', { name: new RegExp(name) })).toBeVisible();
    await expect(page.getByRole('gridcell', { name: /log\.jpg/ })).toContainText('Field 24');
  });

  await test.step('says which is the reference, and makes a find of the three', async () => {
    await page.getByRole('gridcell', { name: /micrometer\.jpg/ }).click();
    await page.getByRole('button', { name: 'More' }).click();
    await page.getByRole('menuitem', { name: /Reference picture/ }).click();
    await expect(page.getByRole('gridcell', { name: /micrometer\.jpg/ })).toContainText('reference picture');
    for (const name of [/log\.jpg/, /spores\.tif/]) {
      await page.getByRole('gridcell', { name }).click({ modifiers: ['Control'] });
    }
    await page.getByRole('toolbar').getByRole('button', { name: 'Make a find' }).click();
    const form = page.getByRole('dialog');
    await expect(form.getByRole('textbox', { name: 'Date' })).toHaveValue('2026-02-14');
    await form.getByLabel('Substrate').fill('on a fallen poplar log, soft rot');
    await form.getByLabel('In words').first().fill('fourth log behind the pump house');
    await form.getByLabel('In words').last().fill('canal towpath, Calder Wick');
    await form.getByRole('radio', { name: /^Public/ }).check();
    await form.getByRole('button', { name: 'Make the find' }).click();
    await expect(form).toBeHidden();
    await page.getByRole('button', { name: /Open|See|Look/ }).click();
    await expect(page).toHaveURL(/\/finds\//);
    findUrl = page.url();
  });

  await test.step('calibrates a setting of her rig by marking graduations', async () => {
    await page.goto('/desk/rigs');
    await page.getByRole('button', { name: 'Add a rig' }).first().click();
    await page.getByLabel('Name').fill('Kitchen microscope');
    await page.getByRole('dialog').getByRole('button', { name: 'Add', exact: true }).click();
    const setting = page.getByRole('dialog', { name: /A setting of/ });
    await setting.getByLabel('Name').fill('63×, full frame');
    await setting.getByLabel('Aperture (NA)').fill('0.85');
    await setting.getByRole('button', { name: 'Add', exact: true }).click();
    await expect(setting).toBeHidden();

    await page.goto(findUrl);
    await picturesOf(page).last().click(); // the scale reference
    await page.getByRole('link', { name: /Calibrate a setting with it/ }).click();
    await page.getByRole('region', { name: 'Kitchen microscope' }).getByRole('link', { name: 'Calibrate' }).click();
    const picture = await onScreen(page);
    for (const graduation of GRADUATIONS) await picture.click(graduation);
    await expect(page.getByText('6 graduations marked')).toBeVisible();
    await page.getByRole('button', { name: 'Keep this scale' }).click();
    await expect(page.getByRole('link', { name: 'Back to the rigs' })).toBeVisible();
  });

  await test.step('the micrograph carries that scale', async () => {
    await page.goto(findUrl);
    await picturesOf(page)
      .filter({ has: page.locator(`img[width="${FRAME.width}"]`) })
      .first()
      .click();
    await page.getByRole('button', { name: /Say what the scale is/ }).click();
    await page
      .getByRole('group', { name: 'Kitchen microscope' })
      .getByRole('button', { name: /63×, full frame/ })
      .click();
    await expect(page.getByText(/0\.2(49|50)\d* µm/).first()).toBeVisible();
  });

  await test.step('she measures three spores along and across, and points at one with words', async () => {
    const picture = await onScreen(page);
    await page.getByRole('button', { name: /^Spore/ }).click();
    for (const { x, y, length, width } of BODIES) {
      await picture.drag({ x: x - length / 2, y }, { x: x + length / 2, y });
      await picture.drag({ x, y: y - width / 2 }, { x, y: y + width / 2 });
    }
    await page.getByRole('button', { name: /^Point at it/ }).click();
    await picture.drag({ x: 265, y: 80 }, { x: 285, y: 60 });
    await page.getByRole('textbox', { name: 'What is said' }).fill('warts, not a net');
    await page.keyboard.press('Enter');
    await expect(page.getByText('all kept')).toBeVisible();
  });

  await test.step('reads lengths with uncertainty, and the series', async () => {
    const series = page.getByRole('table', { name: 'Series in numbers' });
    await expect(series.getByRole('row', { name: /along/ })).toContainText('8.5');
    await expect(series.getByRole('row', { name: /along/ })).toContainText('±');
    await expect(series.getByRole('row', { name: /across/ })).toContainText('6.25');
  });

  await test.step('gives a name with a reason, and lets it stand', async () => {
    await page.goto(findUrl);
    await page.getByRole('button', { name: 'Give a name' }).click();
    await page.getByRole('combobox', { name: /Name, as in the list/ }).fill('hemitrichia clavta');
    await page
      .getByRole('option', { name: /Hemitrichia clavata/ })
      .first()
      .click();
    await page.getByLabel('Reason').fill('Spores 8–9 µm, warted; a deep cup left below.');
    await page.getByRole('button', { name: 'Give the name' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('Hemitrichia clavata');
  });

  await test.step('somebody signed out finds the picture in the gallery by its taxon', async () => {
    const visitor = await (await browser.newContext({ ...(baseURL && { baseURL }) })).newPage();
    await visitor.goto('/');
    await visitor.getByRole('combobox', { name: /taxon/i }).fill('hemitrichia clavata');
    await visitor
      .getByRole('option', { name: /Hemitrichia clavata/ })
      .first()
      .click();
    await expect(visitor).toHaveURL(/taxon=/);
    await visitor
      .getByRole('link')
      .filter({ has: visitor.locator(`img[width="${FRAME.width}"]`) })
      .first()
      .click();
    await expect(visitor).toHaveURL(findUrl);
    await expect(visitor.getByText('fourth log behind the pump house')).toHaveCount(0);

    await test.step('and downloads it with the bar drawn in, right at any size', async () => {
      const card = visitor
        .getByRole('listitem')
        .filter({ has: visitor.locator(`img[width="${FRAME.width}"]`) })
        .last();
      await card.getByRole('button', { name: /Carry away/ }).click();
      const arriving = visitor.waitForEvent('download');
      await visitor.getByRole('menuitem', { name: /PNG/ }).first().click();
      const download = await arriving;
      expect(download.suggestedFilename()).toMatch(/^CW-\d+-hemitrichia-clavata-320\.png$/);
      const address = new URL(download.url());

      for (const format of ['png', 'jpeg']) {
        for (const width of [320, 233, 128]) {
          const copy = async (bar: 'on' | 'off'): Promise<Buffer> => {
            address.search = String(new URLSearchParams({ width: String(width), format, bar }));
            const answer = await visitor.request.get(address.href);
            expect(answer.ok()).toBe(true);
            return answer.body();
          };
          const bar = await readBar(await copy('on'), await copy('off'));
          // the field is 80 µm wide, its bar 10 or 20 µm: which, a hair of the calibration decides
          const read = ((bar?.lengthPx ?? 0) * FRAME.width * TRUE_UM_PER_PX) / width;
          const stated = read < 15 ? 10 : 20;
          expect(Math.abs((bar?.lengthPx ?? 0) - (stated * width) / (FRAME.width * TRUE_UM_PER_PX))).toBeLessThan(0.5);
        }
      }
      const carried = await readFile(await download.path());
      expect(carried.subarray(1, 4).toString('latin1')).toBe('PNG');
    });
    await visitor.context().close();
  });
});
