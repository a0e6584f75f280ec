import exifr from 'exifr';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { missingCharacters, outlineText } from '../../../server/exports/outlined-text.js';
import { scaleBarOverlay } from '../../../server/exports/scale-bar-drawing.js';
import { barLabel } from '../../../shared/scale/scale-bar.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { readBar } from '../../support/bar-ruler.js';
import { bringIn } from '../../support/pictures.js';
import { seeded } from '../../support/random.js';

const [WIDTH, HEIGHT] = [2003, 1402];

/** Light, dark and busy parts, as photographs have them under their bar. */
async function photograph(): Promise<Buffer> {
  const random = seeded(7);
  const data = Buffer.alloc(WIDTH * HEIGHT * 3);
  for (let y = 0; y < HEIGHT; y++) {
    for (let x = 0; x < WIDTH; x++) {
      const base = 130 + 90 * Math.sin(x / 37) * Math.cos(y / 53) + 20 * random.within(0.5);
      const i = (y * WIDTH + x) * 3;
      data[i] = Math.max(0, Math.min(255, base));
      data[i + 1] = Math.max(0, Math.min(255, base * 0.9));
      data[i + 2] = Math.max(0, Math.min(255, base * 0.7));
    }
  }
  return sharp(data, { raw: { width: WIDTH, height: HEIGHT, channels: 3 } })
    .png()
    .toBuffer();
}

/**
 * Of each: the scale in µm/px as it follows from what was told, and the bar, the largest of 1, 2, 5 × 10ⁿ that is at most
 * a quarter of 2003 px, worked by hand.
 */
const KINDS = [
  { grounds: 'calibrated', umPerPx: 0.25, barUm: 100 }, // field 500.75, quarter 125.2
  { grounds: 'referenced', umPerPx: (21.25 * 1000) / 850, barUm: 10_000 }, // 25 µm/px: field 50.075 mm, quarter 12.5 mm
  { grounds: 'estimated', umPerPx: 0.1725, barUm: 50 }, // 3.45/(40 × 0.5): field 345.5, quarter 86.4
] as const;
const SIZES = [2003, 1333, 641];

describe('the drawn-in bar', () => {
  let server: TestApp;
  let owner: Person;
  let browser: Browser;
  let id: string;
  beforeAll(async () => {
    server = await TestApp.open();
    owner = await server.addPerson('photographer');
    browser = await server.signIn(owner);
    id = await bringIn(server, owner, await photograph(), 'Spores, 3rd try.png');
  });
  afterAll(() => server.close());

  const download = async (query: string): Promise<Buffer> => {
    const answer = await browser.get(`/api/images/${id}/picture?${query}`).buffer(true).expect(200);
    return answer.body as Buffer;
  };
  const setScale = async (grounds: (typeof KINDS)[number]['grounds']): Promise<void> => {
    const a = { x: 100, y: 200 };
    if (grounds === 'referenced') {
      // a 5 cent coin, 21.25 mm, across 850 px
      await browser
        .post(`/api/images/${id}/scales`, { by: 'reference', a, b: { x: 950, y: 200 }, objectId: 'euro-0.05' })
        .expect(200);
    } else if (grounds === 'estimated') {
      await browser
        .post(`/api/images/${id}/scales`, {
          by: 'optics',
          pixelPitchUm: 3.45,
          magnification: 40,
          relay: 0.5,
          binning: 1,
        })
        .expect(200);
    } else {
      const rig = (await browser.post('/api/rigs', { name: 'Old brass', camera: '', remarks: '' }).expect(200))
        .body as { id: string };
      const named = {
        name: '40×',
        objective: '',
        magnification: 40,
        numericalAperture: 0.65,
        oneSitting: false,
        captureMode: '',
      };
      const setting = (await browser.post(`/api/rigs/${rig.id}/settings`, named).expect(200)).body as { id: string };
      // graduations of 10 µm, 40 px apart: 0.25 µm/px
      const marks = Array.from({ length: 40 }, (_, index) => ({ at: { x: 100 + 40 * index, y: 300 }, index }));
      await browser
        .post(`/api/rigs/${rig.id}/settings/${setting.id}/calibrations`, {
          imageId: id,
          marks,
          spacingUm: 10,
          toleranceUm: 1.5,
        })
        .expect(200);
    }
    expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({ currentScale: { grounds } });
  };

  let worst = 0;
  afterAll(() => {
    process.stdout.write(`Worst drawn-in bar: off by ${worst.toFixed(3)} px.\n`);
  });

  it.each(KINDS)(
    'is right to half a pixel when $grounds, at three sizes, as JPEG and as PNG',
    async ({ grounds, umPerPx, barUm }) => {
      await setScale(grounds);
      for (const width of SIZES) {
        for (const format of ['jpeg', 'png']) {
          const query = `width=${width}&format=${format}`;
          const reading = await readBar(await download(query), await download(`${query}&bar=off`));
          const expected = ((barUm / umPerPx) * width) / WIDTH;
          const off = Math.abs((reading?.lengthPx ?? Infinity) - expected);
          worst = Math.max(worst, off);
          expect({ grounds, width, format, off: off < 0.5 }).toEqual({ grounds, width, format, off: true });
        }
      }
    },
  );

  it('is missing where there is no scale, and words say so', async () => {
    await browser.post(`/api/images/${id}/scales`, { by: 'nothing' }).expect(200);
    const [drawn, plain] = [await download('width=800&format=png'), await download('width=800&format=png&bar=off')];
    expect(drawn.equals(plain)).toBe(false);
    const overlay = scaleBarOverlay({ picture: { width: 800, height: 560 }, original: { width: WIDTH }, scale: null });
    expect(overlay.svg.match(/<rect/g)).toHaveLength(1); // the ground alone
    expect(overlay.svg).toContain(outlineText('no scale', 18).path);
  });

  it('carries licence and credit, and nothing of the camera', async () => {
    for (const format of ['jpeg', 'png']) {
      const bytes = await download(`width=640&format=${format}`);
      const tags = (await exifr.parse(bytes, { xmp: true, gps: true })) as Record<string, unknown>;
      expect(tags).toMatchObject({
        Artist: 'A photographer',
        Copyright: '(c) A photographer. http://creativecommons.org/licenses/by/4.0/',
      });
      const { xmp } = await sharp(bytes).metadata();
      expect(String(xmp)).toContain('xmpRights:WebStatement>http://creativecommons.org/licenses/by/4.0/<');
      expect(tags).not.toHaveProperty('latitude');
    }
  });

  it('is named for what it shows and how wide it is', async () => {
    const answer = await browser.get(`/api/images/${id}/picture?width=640`);
    expect(answer.headers['content-disposition']).toBe('attachment; filename=spores-3rd-try-640.jpg');
    expect(answer.headers['content-type']).toBe('image/jpeg');
    const whole = await browser.get(`/api/images/${id}/picture?width=8000&format=png`).buffer(true);
    expect(await sharp(whole.body as Buffer).metadata()).toMatchObject({ format: 'png', width: WIDTH, height: HEIGHT });
  });

  it('keeps a contrast of at least 4.5 to 1 with its ground on the brightest picture', () => {
    // white under ink of three quarters: relative luminance after WCAG 2.2
    const channel = (ink: number) => 0.25 * 255 + 0.75 * ink;
    const linear = (value: number) => ((value / 255 + 0.055) / 1.055) ** 2.4;
    const ground = 0.2126 * linear(channel(0x15)) + 0.7152 * linear(channel(0x13)) + 0.0722 * linear(channel(0x0f));
    expect(1.05 / (ground + 0.05)).toBeGreaterThan(4.5);
  });
});

describe('the label', () => {
  it('has a glyph for every character that a bar can carry', () => {
    for (const grounds of ['calibrated', 'referenced', 'estimated'] as const) {
      for (const um of [0.002, 0.05, 0.5, 20, 500, 2000, 50_000, 2_000_000]) {
        expect(missingCharacters(barLabel(um, grounds))).toEqual([]);
      }
    }
    expect(outlineText('≈', 20).path.length).toBeGreaterThan(20);
  });

  it('refuses a character that no bundled font has, instead of drawing an empty box', () => {
    expect(() => outlineText('20 鼠', 12)).toThrow('U+9f20');
  });
});
