import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, renameSync } from 'node:fs';
import { join } from 'node:path';
import { deflateSync, crc32 } from 'node:zlib';
import exifr from 'exifr';
import sharp from 'sharp';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { bringIn, gradient, jpegOf, trayed } from '../../support/pictures.js';

describe('intake', () => {
  let server: TestApp;
  let owner: Person;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open({ MAX_MEGAPIXELS: '20' });
    owner = await server.addPerson('photographer');
    browser = await server.signIn(owner);
  });
  afterEach(() => server.close());

  const madeOf = (id: string) => join(server.config.dataDir, 'renditions', `${id}~1`);

  it('keeps the original byte for byte and makes the copies that pages show', async () => {
    const bytes = await jpegOf(1501, 1003);
    const id = await bringIn(server, owner, bytes, 'Log pile, Tuesday.jpg');
    expect(await trayed(browser, id)).toMatchObject({
      name: 'Log pile, Tuesday.jpg',
      state: 'ready',
      refusal: null,
      bytes: bytes.length,
      image: { width: 1501, height: 1003, renditionWidths: [320, 640, 1280, 1501], scale: null },
    });
    const sha = createHash('sha256').update(bytes).digest('hex');
    expect(readFileSync(join(server.config.dataDir, 'originals', sha.slice(0, 2), sha)).equals(bytes)).toBe(true);
    expect(readdirSync(madeOf(id)).sort()).toEqual(['1280.webp', '1501.webp', '320.webp', '640.webp', 'access.tif']);
    expect(await sharp(join(madeOf(id), '320.webp')).metadata()).toMatchObject({ width: 320, height: 214 });
    const original = await browser.get(`/api/images/${id}/original`).buffer(true).expect(200);
    expect(Buffer.compare(original.body as Buffer, bytes)).toBe(0);
    expect(original.headers['content-disposition']).toBe('attachment; filename="Log pile, Tuesday.jpg"');
  });

  it('takes a placeholder from the picture, left to right', async () => {
    const id = await bringIn(server, owner, await jpegOf(900, 300));
    const { image } = (await trayed(browser, id)) as { image: { colours: string[] } };
    const reds = image.colours.map((colour) => Number.parseInt(colour.slice(1, 3), 16));
    expect(reds).toHaveLength(3);
    expect([reds[0]! < 64, Math.abs(reds[1]! - 128) < 12, reds[2]! > 190]).toEqual([true, true, true]);
  });

  it('reads what the camera wrote, and shows the place to its owner alone', async () => {
    const bytes = await (
      await gradient(400, 300)
    )
      .withExif({
        IFD0: { Make: 'Hollin', Model: 'Hollin H2', Software: 'x' },
        IFD2: {
          DateTimeOriginal: '2025:11:03 10:42:00',
          OffsetTimeOriginal: '+01:00',
          LensModel: 'Near 60',
          FocalLength: '60/1',
          FocalPlaneXResolution: '2500000/1000',
          FocalPlaneYResolution: '2500000/1000',
          FocalPlaneResolutionUnit: '3',
        },
        // 51° 30′ 26.45″ N, 0° 7′ 39.99″ W: degrees + minutes/60 + seconds/3600
        IFD3: {
          GPSLatitudeRef: 'N',
          GPSLatitude: '51/1 30/1 2645/100',
          GPSLongitudeRef: 'W',
          GPSLongitude: '0/1 7/1 3999/100',
        },
      })
      .jpeg()
      .toBuffer();
    const id = await bringIn(server, owner, bytes);
    const picture = await trayed(browser, id);
    expect(picture).toMatchObject({
      capture: {
        local: '2025-11-03T10:42:00',
        offset: '+01:00',
        camera: 'Hollin H2',
        lens: 'Near 60',
        focalLengthMm: 60,
        pixelPitchUm: 4, // 2500 px per cm
      },
    });
    const place = picture['exactPlace'] as { latitude: number; longitude: number };
    expect(place.latitude).toBeCloseTo(51.50734722, 8);
    expect(place.longitude).toBeCloseTo(-0.127775, 8);
    expect(JSON.stringify((await browser.get(`/api/images/${id}`)).body)).not.toContain('51.5');
  });

  it('makes copies that carry none of it', async () => {
    const bytes = await (
      await gradient(700, 500)
    )
      .withExif({ IFD0: { Make: 'Hollin' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' } })
      .withXmp(
        '<x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#"/></x:xmpmeta>',
      )
      .jpeg()
      .toBuffer();
    expect(await exifr.parse(bytes)).toMatchObject({ Make: 'Hollin' });
    const id = await bringIn(server, owner, bytes);
    for (const file of readdirSync(madeOf(id))) {
      const path = join(madeOf(id), file);
      const { exif, xmp, iptc } = await sharp(path).metadata();
      expect([file, exif, xmp, iptc]).toEqual([file, undefined, undefined, undefined]);
      expect(readFileSync(path).includes('Hollin')).toBe(false);
      if (file.endsWith('.tif')) expect(await exifr.parse(path, { gps: true })).not.toHaveProperty('GPSLatitude');
    }
  });

  it('shows a 16-bit picture of 12 bits with contrast, and leaves its original alone', async () => {
    const [width, height] = [600, 400];
    const values = new Uint16Array(width * height);
    for (let i = 0; i < values.length; i++) values[i] = 400 + Math.round((3400 * (i % width)) / width);
    const bytes = await sharp(values, { raw: { width, height, channels: 1 } })
      .toColourspace('grey16')
      .tiff({ compression: 'lzw' })
      .toBuffer();
    const id = await bringIn(server, owner, bytes, 'micrograph.tif');
    expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({
      bitDepth: 16,
      format: 'tiff',
      width,
      height,
    });
    const shown = await sharp(join(madeOf(id), 'access.tif')).stats();
    const { min, max, mean } = shown.channels[0]!;
    expect([min < 5, max > 250, Math.abs(mean - 127.5) < 5]).toEqual([true, true, true]);
    const original = await browser.get(`/api/images/${id}/original`).buffer(true);
    expect(Buffer.compare(original.body as Buffer, bytes)).toBe(0);
  });

  // Exif orientations as CIPA DC-008 defines them: where the stored top left corner comes to lie upright
  it.each([
    [3, 'right', 'bottom'],
    [6, 'right', 'top'],
    [8, 'left', 'bottom'],
  ] as const)(
    'stands orientation %i upright: the stored first corner comes to the %s %s',
    async (orientation, across, down) => {
      const stored = Buffer.alloc(60 * 40 * 3, 0);
      for (let y = 0; y < 10; y++) for (let x = 0; x < 10; x++) stored[(y * 60 + x) * 3] = 255; // red in the first corner
      for (const format of ['jpeg', 'tiff'] as const) {
        const bytes = await sharp(stored, { raw: { width: 60, height: 40, channels: 3 } })
          .withMetadata({ orientation })
          .toFormat(format, { quality: 100 })
          .toBuffer();
        const id = await bringIn(server, owner, bytes, `turned.${format}`);
        const { width, height } = (await browser.get(`/api/images/${id}`)).body as { width: number; height: number };
        expect([width, height]).toEqual(orientation === 3 ? [60, 40] : [40, 60]);
        const { data, info } = await sharp(join(madeOf(id), 'access.tif'))
          .raw()
          .toBuffer({ resolveWithObject: true });
        const red = (x: number, y: number) => data[(y * info.width + x) * info.channels]!;
        const x = across === 'left' ? 3 : width - 4;
        const y = down === 'top' ? 3 : height - 4;
        expect(red(x, y)).toBeGreaterThan(150);
        expect(red(width - 1 - x, height - 1 - y)).toBeLessThan(100);
      }
    },
  );

  it('says what a file is that it does not take, whatever its name', async () => {
    const refused = async (bytes: Buffer, name: string) =>
      (await trayed(browser, await bringIn(server, owner, bytes, name)))['refusal'];
    const svg = Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>');
    expect(await refused(svg, 'picture.jpg')).toEqual({ code: 'type-not-accepted', parameters: { found: 'SVG' } });
    const gif = await (await gradient(20, 20)).gif().toBuffer();
    expect(await refused(gif, 'picture.png')).toEqual({ code: 'type-not-accepted', parameters: { found: 'GIF' } });
    const avif = await (await gradient(64, 64)).avif().toBuffer();
    expect(await refused(avif, 'picture.webp')).toEqual({ code: 'type-not-accepted', parameters: { found: 'AVIF' } });
    const heic = Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic'), Buffer.alloc(40)]);
    expect(await refused(heic, 'IMG_0001.JPG')).toEqual({ code: 'type-not-accepted', parameters: { found: 'HEIC' } });
    expect(await refused(Buffer.from('not a picture'), 'a.tif')).toEqual({
      code: 'type-not-accepted',
      parameters: { found: 'unknown' },
    });
    expect(await refused(Buffer.alloc(0), 'empty.jpg')).toEqual({
      code: 'type-not-accepted',
      parameters: { found: 'nothing' },
    });
  });

  it('takes a picture with a wrong extension for what it is', async () => {
    const png = await (await gradient(50, 40)).png().toBuffer();
    const id = await bringIn(server, owner, png, 'really-a-png.tif');
    expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({ format: 'png', width: 50, height: 40 });
  });

  it('refuses TIFF of floating point, which has no agreed way to be shown', async () => {
    const id = await bringIn(server, owner, floatTiff(8, 8), 'elevation.tif');
    expect(await trayed(browser, id)).toMatchObject({
      state: 'refused',
      refusal: { code: 'type-not-accepted', parameters: { found: 'TIFF, float' } },
    });
  });

  it('refuses a small file that claims to be huge, without decoding it', async () => {
    for (const [name, bomb] of [
      ['bomb.png', pngClaiming(60_000, 60_000)],
      ['bomb.tif', tiffClaiming(60_000, 60_000)],
    ] as const) {
      expect(bomb.length).toBeLessThan(10_000);
      const id = await bringIn(server, owner, bomb, name);
      expect(await trayed(browser, id)).toMatchObject({
        state: 'refused',
        refusal: { code: 'too-many-pixels', parameters: { megapixels: 3600, mostMegapixels: 20 } },
      });
    }
  });

  it('refuses a JPEG that breaks off in the middle', async () => {
    const whole = await jpegOf(800, 600);
    const id = await bringIn(server, owner, whole.subarray(0, Math.floor(whole.length / 2)));
    expect(await trayed(browser, id)).toMatchObject({ state: 'refused', refusal: { code: 'not-readable' } });
    expect(readdirSync(join(server.config.dataDir, 'renditions'))).toEqual([]);
  });

  it('can be tried again after a refusal, by its owner', async () => {
    const id = await bringIn(server, owner, Buffer.from('nothing good'));
    expect((await browser.post(`/api/images/${id}/retry`).expect(200)).body).toMatchObject({
      id,
      state: 'waiting',
      refusal: null,
    });
    await server.app.jobs.drain();
    expect(await trayed(browser, id)).toMatchObject({ state: 'refused' });
    const other = await server.signIn(await server.addPerson('photographer'));
    await other.post(`/api/images/${id}/retry`).expect(404);
  });

  it('tries again when its process breaks down, and says so in the end', async () => {
    const bytes = await jpegOf(300, 200);
    const id = await server.app.bringIn({ file: bytes, name: 'a.jpg', ownerId: owner.id });
    const sha = createHash('sha256').update(bytes).digest('hex');
    const original = join(server.config.dataDir, 'originals', sha.slice(0, 2), sha);
    renameSync(original, `${original}.away`); // what it works on is gone: no picture's own fault
    for (let attempt = 0; attempt < 3; attempt++) {
      expect((await trayed(browser, id))['refusal']).toBeNull();
      await server.app.jobs.drain();
      server.clock.pass(60 * 60_000);
    }
    expect(await trayed(browser, id)).toMatchObject({ state: 'refused', refusal: { code: 'intake-failed' } });
    renameSync(`${original}.away`, original);
    await browser.post(`/api/images/${id}/retry`).expect(200);
    await server.app.jobs.drain();
    expect(await trayed(browser, id)).toMatchObject({ state: 'ready' });
  });

  it('that was given up is taken in when the keeper has its job done again', async () => {
    const bytes = await jpegOf(300, 200);
    const id = await server.app.bringIn({ file: bytes, name: 'a.jpg', ownerId: owner.id });
    const sha = createHash('sha256').update(bytes).digest('hex');
    const original = join(server.config.dataDir, 'originals', sha.slice(0, 2), sha);
    renameSync(original, `${original}.away`);
    for (let attempt = 0; attempt < 3; attempt++) {
      await server.app.jobs.drain();
      server.clock.pass(60 * 60_000);
    }
    renameSync(`${original}.away`, original);
    const desk = await server.signIn(await server.addPerson('keeper'));
    const [job] = (await desk.get('/api/keep/jobs').expect(200)).body as { id: string; state: string }[];
    expect(job).toMatchObject({ state: 'failed' });
    await desk.post(`/api/keep/jobs/${job?.id}/retry`).expect(200);
    await server.app.jobs.drain();
    expect(await trayed(browser, id)).toMatchObject({ state: 'ready', refusal: null });
  });

  it('notices the same bytes and keeps them once, until the last picture of them goes', async () => {
    const bytes = await jpegOf(300, 200);
    const first = await bringIn(server, owner, bytes, 'first.jpg');
    const second = await bringIn(server, owner, bytes, 'second.jpg');
    expect((await trayed(browser, first))['sameAs']).toBeNull();
    expect((await trayed(browser, second))['sameAs']).toEqual({ imageId: first, name: 'first.jpg', findNumber: null });
    const originals = () =>
      readdirSync(join(server.config.dataDir, 'originals'), { recursive: true, withFileTypes: true }).filter((entry) =>
        entry.isFile(),
      ).length;
    expect(originals()).toBe(1);
    await browser.delete(`/api/images/${second}`).expect(204);
    await server.app.jobs.drain();
    expect(originals()).toBe(1);
    await browser.get(`/api/images/${second}`).expect(404);
    await browser.delete(`/api/images/${first}`).expect(204);
    await server.app.jobs.drain();
    expect(originals()).toBe(0);
    expect(readdirSync(join(server.config.dataDir, 'renditions'))).toEqual([]);
  });

  it('does not notice the bytes of other people', async () => {
    const bytes = await jpegOf(300, 200);
    await bringIn(server, await server.addPerson('photographer'), bytes);
    expect((await trayed(browser, await bringIn(server, owner, bytes)))['sameAs']).toBeNull();
  });
});

describe('the limits of intake', () => {
  it.each([
    ['time', { memoryBytes: 4e9, timeMs: 1 }, { code: 'took-too-long', parameters: { seconds: 0 } }],
    [
      'memory',
      { memoryBytes: 1e6, timeMs: 60_000 },
      { code: 'intake-failed', parameters: { reason: 'memory', megabytes: 1 } },
    ],
  ])('end a picture that takes too much %s, with a word to its owner', async (_name, intakeLimits, refusal) => {
    const server = await TestApp.open({}, { intakeLimits });
    try {
      const owner = await server.addPerson('photographer');
      const id = await bringIn(server, owner, await jpegOf(400, 300));
      expect((await trayed(await server.signIn(owner), id))['refusal']).toEqual(refusal);
    } finally {
      await server.close();
    }
  });
});

function chunk(type: string, data: Buffer): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  body.copy(out, 4);
  out.writeUInt32BE(crc32(body), body.length + 4);
  return out;
}

/** A PNG whose header claims a size that its few bytes could never fill. */
function pngClaiming(width: number, height: number): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 2, 0, 0, 0], 8);
  const signature = Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]);
  return Buffer.concat([
    signature,
    chunk('IHDR', header),
    chunk('IDAT', deflateSync(Buffer.alloc(1000))),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}

/** TIFF 6.0, one strip, little-endian. */
function tiff(entries: readonly (readonly [tag: number, type: 3 | 4, value: number])[], data: Buffer): Buffer {
  const dataAt = 8 + 2 + entries.length * 12 + 4;
  const out = Buffer.alloc(dataAt);
  out.write('II*\0', 0, 'latin1');
  out.writeUInt32LE(8, 4);
  out.writeUInt16LE(entries.length, 8);
  entries.forEach(([tag, type, value], i) => {
    const at = 10 + i * 12;
    out.writeUInt16LE(tag, at);
    out.writeUInt16LE(type, at + 2);
    out.writeUInt32LE(1, at + 4);
    out.writeUInt32LE(tag === 273 ? dataAt : value, at + 8);
  });
  return Buffer.concat([out, data]);
}

function tiffClaiming(width: number, height: number): Buffer {
  const tags = [
    [256, 4, width],
    [257, 4, height],
    [258, 3, 8],
    [259, 3, 1],
    [262, 3, 1],
    [273, 4, 0],
    [277, 3, 1],
    [278, 4, height],
    [279, 4, 100],
  ] as const;
  return tiff(tags, Buffer.alloc(100));
}

function floatTiff(width: number, height: number): Buffer {
  const bytes = width * height * 4;
  const tags = [
    [256, 4, width],
    [257, 4, height],
    [258, 3, 32],
    [259, 3, 1],
    [262, 3, 1],
    [273, 4, 0],
    [277, 3, 1],
    [278, 4, height],
    [279, 4, bytes],
    [339, 3, 3],
  ] as const;
  return tiff(tags, Buffer.alloc(bytes));
}
