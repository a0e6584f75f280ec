import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { deliveryRoutes } from '../../../shared/contracts/delivery.js';
import { type Actor, can, type FindThing, type Visibility, VISITOR } from '../../../shared/permission/can.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { bringIn, jpegOf } from '../../support/pictures.js';
import { World } from '../../support/world.js';

const VISIBILITIES: Visibility[] = ['private', 'group', 'public', 'held'];

describe('pictures as pages fetch them', () => {
  let server: TestApp;
  let world: World;
  let owner: Person;
  let ownerBrowser: Browser;
  let visitor: Browser;
  let tray: string;
  const of = {} as Record<Visibility, string>;
  beforeAll(async () => {
    server = await TestApp.open({ PUBLIC_URL: 'http://motebook.example' });
    world = new World(server);
    owner = await server.addPerson('photographer');
    visitor = await server.visit();
    tray = await bringIn(server, owner, await jpegOf(1400, 1100));
    for (const visibility of VISIBILITIES) {
      const find = await world.find(owner, { visibility, heldUntil: visibility === 'held' ? '2099-01-01' : null });
      of[visibility] = await bringIn(server, owner, await jpegOf(1400, 1100));
      await server.db
        .write('images')
        .where({ id: of[visibility] })
        .update({ observation_id: await world.observation(find, owner) });
    }
    ownerBrowser = await server.signIn(owner);
  });
  afterAll(() => server.close());

  const open = async (path: string, browser = visitor) => browser.get(path).buffer(true);

  it('exist for those who may see the picture, and for nobody else', async () => {
    const other = await server.addPerson('keeper');
    const actors: [Actor, Browser][] = [
      [VISITOR, visitor],
      [{ kind: 'user', id: other.id, role: 'keeper' }, await server.signIn(other)],
      [{ kind: 'user', id: owner.id, role: 'photographer' }, ownerBrowser],
    ];
    const parts: Record<string, string> = {
      revision: '1',
      region: '0,0,64,64',
      size: 'max',
      rotation: '0',
      file: 'default.jpg',
    };
    for (const [name, { path }] of Object.entries(deliveryRoutes)) {
      for (const visibility of [...VISIBILITIES, null]) {
        const id = visibility === null ? tray : of[visibility];
        const find: FindThing | null =
          visibility === null
            ? null
            : {
                kind: 'find',
                ownerId: owner.id,
                visibility,
                heldUntil: visibility === 'held' ? '2099-01-01' : null,
                placeReaders: [],
              };
        const url = path.replace(/:(\w+)/g, (_all, part: string) =>
          part === 'imageId' ? id : name === 'rendition' && part === 'file' ? '320.webp' : (parts[part] ?? ''),
        );
        for (const [actor, browser] of actors) {
          const may = can(actor, 'image.read', { kind: 'image', ownerId: owner.id, find }, '2026-03-01');
          const { status } = await browser.get(url);
          expect([url, actor.kind, status]).toEqual([
            url,
            actor.kind,
            may ? (name.startsWith('iiifBase') ? 303 : 200) : 404,
          ]);
        }
      }
    }
  });

  it('may be kept for ever by whoever saw it, for a minute by caches that many share, and not by those when hidden', async () => {
    expect((await open(`/renditions/${of.public}~1/320.webp`)).headers['cache-control']).toBe(
      'public, max-age=31536000, immutable, s-maxage=60',
    );
    expect((await open(`/iiif/${of.public}~1/full/100,/0/default.jpg`)).headers['cache-control']).toBe(
      'public, max-age=31536000, immutable, s-maxage=60',
    );
    expect((await open(`/iiif/${of.public}/info.json`)).headers['cache-control']).toBe('public, no-cache');
    for (const path of [
      `/renditions/${of.private}~1/320.webp`,
      `/iiif/${of.private}~1/info.json`,
      `/iiif/${of.private}/info.json`,
    ]) {
      expect((await open(path, ownerBrowser)).headers['cache-control']).toMatch(/^private/);
    }
  });

  it('have no other revision and no other width', async () => {
    for (const path of [
      `/renditions/${of.public}~2/320.webp`,
      `/renditions/${of.public}~1/321.webp`,
      `/renditions/${of.public}~1/access.tif`,
    ]) {
      expect([path, (await open(path)).status]).toEqual([path, 404]);
    }
    expect((await open(`/renditions/${of.public}~1/..%2f..%2fmotebook.sqlite`)).status).toBe(404);
    expect((await open(`/iiif/${of.public}~2/info.json`)).status).toBe(404);
  });

  it('describe themselves as IIIF Image API 3 has it, under the id that was asked', async () => {
    for (const name of [of.public, `${of.public}~1`]) {
      const answer = await open(`/iiif/${name}/info.json`);
      expect(answer.headers['content-type']).toMatch(/^application\/json/);
      expect(answer.headers['access-control-allow-origin']).toBe('*');
      expect(answer.headers['cross-origin-resource-policy']).toBe('cross-origin');
      expect(answer.body).toEqual({
        '@context': 'http://iiif.io/api/image/3/context.json',
        id: `http://motebook.example/iiif/${name}`,
        type: 'ImageService3',
        protocol: 'http://iiif.io/api/image',
        profile: 'level2',
        width: 1400,
        height: 1100,
        maxArea: 16_777_216,
        sizes: [
          { width: 350, height: 275 },
          { width: 700, height: 550 },
          { width: 1400, height: 1100 },
        ],
        tiles: [{ width: 512, height: 512, scaleFactors: [1, 2, 4] }],
        rights: 'http://creativecommons.org/licenses/by/4.0/',
        extraFormats: ['webp'],
        extraQualities: ['color', 'gray', 'bitonal'],
        extraFeatures: ['mirroring', 'sizeUpscaling'],
      });
    }
    const linked = await visitor.get(`/iiif/${of.public}/info.json`).set('Accept', 'application/ld+json');
    expect(linked.headers['content-type']).toContain(
      'application/ld+json;profile="http://iiif.io/api/image/3/context.json"',
    );
  });

  it('send whoever asks for the bare id to its description', async () => {
    const answer = await visitor.get(`/iiif/${of.public}`);
    expect([answer.status, answer.headers['location']]).toEqual([
      303,
      `http://motebook.example/iiif/${of.public}/info.json`,
    ]);
  });

  it('are not sent again to those who have them', async () => {
    const path = `/iiif/${of.public}/full/200,/0/default.jpg`;
    const etag = (await open(path)).headers['etag'] ?? '';
    expect(etag).toMatch(/^".+"$/);
    expect((await visitor.get(path).set('If-None-Match', etag)).status).toBe(304);
  });

  /** red grows to the right over 1400 px, green downwards over 1100 px */
  const places = async (bytes: Buffer) => {
    const { data, info } = await sharp(bytes).raw().toBuffer({ resolveWithObject: true });
    const at = (x: number, y: number) => ({
      x: (data[(y * info.width + x) * info.channels]! / 255) * 1400,
      y: (data[(y * info.width + x) * info.channels + 1]! / 255) * 1100,
    });
    return { width: info.width, height: info.height, first: at(0, 0), last: at(info.width - 1, info.height - 1) };
  };
  const near = (found: { x: number; y: number }, x: number, y: number) => {
    expect([Math.abs(found.x - x) < 15, Math.abs(found.y - y) < 15, found]).toEqual([true, true, found]);
  };

  it('show the region that was asked, at the size that was asked, turned as asked', async () => {
    const cut = async (rest: string) => places((await open(`/iiif/${of.public}~1/${rest}`)).body as Buffer);
    const plain = await cut('300,200,600,400/300,/0/default.png');
    expect([plain.width, plain.height]).toEqual([300, 200]);
    near(plain.first, 300, 200);
    near(plain.last, 900, 600);
    const turned = await cut('300,200,600,400/300,/90/default.png'); // clockwise: the lower left corner comes first
    expect([turned.width, turned.height]).toEqual([200, 300]);
    near(turned.first, 300, 600);
    near(turned.last, 900, 200);
    const mirrored = await cut('300,200,600,400/300,/!0/default.png');
    near(mirrored.first, 900, 200);
    const both = await cut('300,200,600,400/300,/!90/default.png'); // mirrored first, then turned
    near(both.first, 900, 600);
    near(both.last, 300, 200);
    const tile = await cut('512,512,512,512/256,256/0/default.jpg'); // of the half-size level
    near(tile.first, 512, 512);
    near(tile.last, 1024, 1024);
    const last = await cut('1024,1024,376,76/188,38/0/default.jpg'); // what is left at the far corner
    expect([last.width, last.height]).toEqual([188, 38]);
  });

  it('come in grey and in black and white', async () => {
    const grey = await sharp((await open(`/iiif/${of.public}~1/full/200,/0/gray.png`)).body as Buffer).stats();
    expect(grey.isOpaque && grey.channels.every((channel) => channel.mean === grey.channels[0]!.mean)).toBe(true);
    const { data } = await sharp((await open(`/iiif/${of.public}~1/full/200,/0/bitonal.png`)).body as Buffer)
      .raw()
      .toBuffer({ resolveWithObject: true });
    expect([...new Set(data)].sort((a, b) => a - b)).toEqual([0, 255]);
  });

  it('answer what can’t be answered with a problem', async () => {
    const answer = await open(`/iiif/${of.public}/full/^30000,30000/0/default.png`);
    expect([answer.status, (answer.body as { type: string }).type]).toEqual([400, '/problems/iiif-size']);
  });
});
