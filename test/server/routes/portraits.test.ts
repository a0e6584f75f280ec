import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import sharp from 'sharp';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Browser, TestApp } from '../../support/app.js';

describe('a portrait', () => {
  let server: TestApp;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    browser = await server.signIn(await server.addPerson('photographer'));
  });
  afterEach(() => server.close());

  const send = (bytes: Buffer, name = 'ich, größer.jpg') =>
    browser.send('put', '/api/me/portrait').attach('portrait', bytes, name);
  const photograph = () =>
    sharp({ create: { width: 900, height: 600, channels: 3, background: '#a84a24' } })
      .jpeg()
      .withExif({
        IFD0: { Artist: 'somebody', Orientation: '6' },
        IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '54/1 0/1 0/1' },
      })
      .toBuffer();
  const files = (): string[] =>
    readdirSync(join(server.config.dataDir, 'portraits'), { recursive: true }).map(String).sort();

  it('is made square, carries nothing of the photograph’s notes, and everybody may see it', async () => {
    const saved = await send(await photograph()).expect(200);
    const { portraitUrl } = saved.body as { portraitUrl: string };
    const seen = await (
      await server.visit()
    )
      .get(portraitUrl)
      .buffer(true)
      .expect(200)
      .expect('Content-Type', 'image/webp');
    expect(seen.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    const { width, height, exif, format } = await sharp(seen.body as Buffer).metadata();
    expect({ width, height, exif, format }).toEqual({ width: 320, height: 320, exif: undefined, format: 'webp' });
  });

  it('replaces the earlier one, under a new name', async () => {
    const first = (await send(await photograph())).body as { portraitUrl: string };
    const second = (await send(await photograph())).body as { portraitUrl: string };
    expect(second.portraitUrl).not.toBe(first.portraitUrl);
    expect((await browser.get('/api/session')).body).toMatchObject({ user: { portraitUrl: second.portraitUrl } });
    await browser.get(first.portraitUrl).expect(404);
    expect(files()).toEqual([second.portraitUrl.split('/').at(-1), 'incoming']);
  });

  it('is refused when it is no picture, whatever its name says, and nothing is left of it', async () => {
    const refused = await send(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'), 'me.jpg').expect(415);
    expect(refused.body).toMatchObject({ type: '/problems/type-not-accepted' });
    expect(files()).toEqual(['incoming']);
  });

  it('is refused when it is too large', async () => {
    const refused = await send(Buffer.alloc(8 * 1024 * 1024 + 1)).expect(413);
    expect(refused.body).toMatchObject({ type: '/problems/too-large' });
    expect(files()).toEqual(['incoming']);
  });

  it('needs a file', async () => {
    const refused = await browser.send('put', '/api/me/portrait').expect(422);
    expect(refused.body).toMatchObject({ errors: [{ pointer: '#/portrait' }] });
    await browser
      .send('put', '/api/me/portrait')
      .attach('likeness', await photograph(), 'me.jpg')
      .expect(400);
  });

  it('is not found under names that are no portrait’s', async () => {
    for (const name of ['..%2fsession-secret', '01980000-0000-7000-8000-000000000000.webp', 'incoming']) {
      await browser.get(`/portraits/${name}`).expect(404);
    }
  });
});
