import { expect, type Locator, type Page } from '@playwright/test';
import sharp from 'sharp';
import { FIDUCIALS } from '../../test/support/field-pictures.js';

interface Place {
  readonly x: number;
  readonly y: number;
}

const distance = (a: Place, b: Place): number => Math.hypot(a.x - b.x, a.y - b.y);

/**
 * Where image pixels lie on the screen, found by the picture's own magenta discs in a screenshot and not by
 * anything that the application says of its view. The view must not be turned.
 */
export class PictureOnScreen {
  private constructor(
    private readonly page: Page,
    /** screen pixels per image pixel */
    readonly zoom: Place,
    private readonly origin: Place,
  ) {}

  /** @throws {Error} when the three discs are not all in view, or the picture is too small to click in */
  static async within(surface: Locator): Promise<PictureOnScreen> {
    const box = await surface.boundingBox();
    if (!box) throw new Error('The picture is not on the screen.');
    const { zoom, origin } = await placeInScreenshot(await surface.screenshot({ scale: 'css' }));
    if (zoom.x < 3.9)
      throw new Error(`Only ${zoom.x.toFixed(2)} screen pixels per image pixel: too coarse to click by.`);
    return new PictureOnScreen(surface.page(), zoom, { x: box.x + origin.x, y: box.y + origin.y });
  }

  /** The same once the view has come to rest: two readings, a moment apart, that agree. */
  static async atRest(surface: Locator): Promise<PictureOnScreen> {
    let last: PictureOnScreen | null = null;
    await expect(async () => {
      const seen = await PictureOnScreen.within(surface);
      const agrees = last !== null && distance(seen.at({ x: 0, y: 0 }), last.at({ x: 0, y: 0 })) < 0.1;
      last = seen;
      expect(agrees && Math.abs(seen.zoom.x - last.zoom.x) < 0.001).toBe(true);
    }).toPass({ timeout: 20_000, intervals: [250] });
    return last as unknown as PictureOnScreen;
  }

  /** Screen (CSS) pixels of a place in the picture. */
  at({ x, y }: Place): Place {
    return { x: this.origin.x + x * this.zoom.x, y: this.origin.y + y * this.zoom.y };
  }

  async click(place: Place): Promise<void> {
    const { x, y } = this.at(place);
    await this.page.mouse.click(x, y);
  }

  async drag(from: Place, to: Place): Promise<void> {
    const [start, end] = [this.at(from), this.at(to)];
    await this.page.mouse.move(start.x, start.y);
    await this.page.mouse.down();
    await this.page.mouse.move((start.x + end.x) / 2, (start.y + end.y) / 2);
    await this.page.mouse.move(end.x, end.y);
    await this.page.mouse.up();
  }
}

/**
 * Where the picture lies in a screenshot of its surface, by its discs alone; in pixels of the screenshot.
 * @throws {Error} when the three discs are not all in view
 */
export async function placeInScreenshot(png: Buffer): Promise<{ readonly zoom: Place; readonly origin: Place }> {
  const { data, info } = await sharp(png).removeAlpha().raw().toBuffer({ resolveWithObject: true });
  const discs = clusters(magentaPixels(data, info.width, info.height));
  if (discs.length !== FIDUCIALS.length) throw new Error(`Found ${discs.length} discs instead of ${FIDUCIALS.length}.`);
  // which is which, by the corner that it lies nearest to: the view is not turned
  const corner = (places: readonly Place[]): [Place, Place, Place] => {
    const by = (measure: (place: Place) => number): Place =>
      [...places].sort((a, b) => measure(a) - measure(b))[0] as Place;
    return [by((p) => p.x + p.y), by((p) => p.y - p.x), by((p) => p.x - p.y)];
  };
  const [seenTopLeft, seenTopRight, seenBottomLeft] = corner(discs);
  const [topLeft, topRight, bottomLeft] = corner(FIDUCIALS);
  const zoom = {
    x: (seenTopRight.x - seenTopLeft.x) / (topRight.x - topLeft.x),
    y: (seenBottomLeft.y - seenTopLeft.y) / (bottomLeft.y - topLeft.y),
  };
  return { zoom, origin: { x: seenTopLeft.x - topLeft.x * zoom.x, y: seenTopLeft.y - topLeft.y * zoom.y } };
}

function magentaPixels(data: Buffer, width: number, height: number): Place[] {
  const found: Place[] = [];
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const at = (y * width + x) * 3;
      const [r = 0, g = 0, b = 0] = [data[at], data[at + 1], data[at + 2]];
      if (r > 170 && b > 170 && g < 100) found.push({ x: x + 0.5, y: y + 0.5 });
    }
  }
  return found;
}

/** Middles of groups of pixels that lie near each other. */
function clusters(pixels: readonly Place[]): Place[] {
  const groups: { sum: Place; count: number }[] = [];
  for (const pixel of pixels) {
    const group = groups.find(({ sum, count }) => Math.hypot(sum.x / count - pixel.x, sum.y / count - pixel.y) < 40);
    if (group) {
      group.sum = { x: group.sum.x + pixel.x, y: group.sum.y + pixel.y };
      group.count++;
    } else {
      groups.push({ sum: pixel, count: 1 });
    }
  }
  return groups.filter(({ count }) => count > 30).map(({ sum, count }) => ({ x: sum.x / count, y: sum.y / count }));
}
