import sharp, { type Sharp } from 'sharp';
import type { TestApp, Browser, Person } from './app.js';

/** Pictures that tests make for themselves: not the demo's. */

/** A smooth picture whose every place has its own colour: red grows to the right, green downwards. */
export async function gradient(width: number, height: number): Promise<Sharp> {
  const data = Buffer.alloc(width * height * 3);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const i = (y * width + x) * 3;
      data[i] = Math.round((255 * (x + 0.5)) / width);
      data[i + 1] = Math.round((255 * (y + 0.5)) / height);
      data[i + 2] = 90;
    }
  }
  return sharp(data, { raw: { width, height, channels: 3 } });
}

export async function jpegOf(width: number, height: number): Promise<Buffer> {
  return (await gradient(width, height)).jpeg({ quality: 95 }).toBuffer();
}

/** Brings bytes in and waits for their intake. */
export async function bringIn(server: TestApp, owner: Person, file: Buffer, name = 'picture.jpg'): Promise<string> {
  const id = await server.app.bringIn({ file, name, ownerId: owner.id });
  await server.app.jobs.drain();
  return id;
}

/** What the tray says of one picture. */
export async function trayed(browser: Browser, id: string): Promise<Record<string, unknown>> {
  const answer = await browser.get('/api/tray').expect(200);
  const found = (answer.body as { id: string }[]).find((picture) => picture.id === id);
  if (!found) throw new Error(`${id} is not in the tray.`);
  return found;
}
