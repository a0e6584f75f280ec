import { existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '../../server/app.js';
import { systemClock } from '../../server/clock.js';
import { readConfig } from '../../server/config.js';
import { type Database, openDatabase } from '../../server/db/database.js';
import { DEMO_PEOPLE } from '../../server/demo.js';
import { openWithDemo } from '../../seeds/demo.js';
import { readTruth, type TruePicture } from '../../seeds/pictures/truth.js';
import type { FindView } from '../../shared/contracts/finds.js';
import type { GalleryPage } from '../../shared/contracts/gallery.js';
import type { SeriesView } from '../../shared/contracts/series.js';
import { Browser } from '../support/app.js';

const log = pino({ level: 'silent' });

function newFolder(): string {
  return mkdtempSync(join(tmpdir(), 'motebook-demo-'));
}

/** numbers of the finds that have series, in the order in which they are told */
const MEASURED = ['CW-1', 'CW-2', 'CW-4', 'CW-7'];
/** the find whose picture leads the gallery */
const HEADS = 'CW-7';

describe('the demo', () => {
  const dataDir = newFolder();
  const config = readConfig({ DATA_DIR: dataDir, LOG_LEVEL: 'silent' });
  let db: Database;
  let app: ReturnType<typeof createApp>;
  let visitor: Browser;
  let truth: Record<string, TruePicture>;
  beforeAll(async () => {
    truth = await readTruth();
    // what a start that was killed in the middle leaves, with a half-made picture
    writeFileSync(join(dataDir, 'demo-is-being-filled-in'), '');
    await (await openDatabase(dataDir)).close();
    mkdirSync(join(dataDir, 'originals', 'ab'), { recursive: true });
    writeFileSync(join(dataDir, 'originals', 'ab', 'half'), 'half');
    writeFileSync(join(dataDir, 'somebody-else.txt'), 'kept');
    db = await openWithDemo({ config, log, forTests: true });
    app = createApp({ config, db, clock: systemClock, log, forTests: true });
    visitor = new Browser(request.agent(app.express));
  }, 120_000);
  afterAll(async () => {
    await app.stop();
    await db.close();
    rmSync(dataDir, { recursive: true, force: true });
  });

  const findOf = async (number: string): Promise<FindView> => {
    const { tiles } = (await visitor.get('/api/gallery?limit=60').expect(200)).body as GalleryPage;
    const tile = tiles.find(({ findNumber }) => findNumber === number);
    return (await visitor.get(`/api/finds/${tile?.findId}`).expect(200)).body as FindView;
  };
  const fileOf = async (imageId: string): Promise<TruePicture> => {
    const names: Record<string, string> = {
      'CWSL2214.JPG': 'heads-on-bark.jpg',
      'CWSL2290.JPG': 'finger-beside-cap.jpg',
      'bench_0041.tif': 'spores-clavata.tif',
      'bench_0057.jpg': 'spores-ellipsoid.jpg',
      'MOL-0312.jpg': 'threads-dark-field.jpg',
    };
    const row = (await db.read('images').where({ id: imageId }).first('original_name')) as { original_name: string };
    return truth[names[row.original_name] as string] as TruePicture;
  };

  it('begins anew where it was cut off, leaves no mark, and touches nothing else', () => {
    expect(existsSync(join(dataDir, 'originals', 'ab', 'half'))).toBe(false);
    expect(readdirSync(dataDir)).not.toContain('demo-is-being-filled-in');
    expect(readdirSync(dataDir)).toContain('somebody-else.txt');
  });

  it('lets its four people sign in', async () => {
    for (const { email, password, role } of DEMO_PEOPLE) {
      const browser = new Browser(request.agent(app.express));
      await browser.get('/api/session');
      expect((await browser.post('/api/session', { email, password }).expect(200)).body).toMatchObject({
        user: { role },
      });
    }
  });

  it('shows its public pictures, described and named, and none of reference', async () => {
    const { tiles, total } = (await visitor.get('/api/gallery?limit=60')).body as GalleryPage;
    expect(total).toBe(6);
    expect(tiles.every((tile) => tile.name !== null && tile.altText !== '' && tile.title !== '')).toBe(true);
    expect(new Set(tiles.map((tile) => tile.scale?.grounds ?? 'none'))).toEqual(
      new Set(['calibrated', 'estimated', 'none']),
    );
  });

  it('keeps its private find, its held find and the draft in the tray to itself', async () => {
    const text = JSON.stringify((await visitor.get('/api/gallery?limit=60')).body);
    expect(text).not.toContain('garden');
    const finds = (await db.read('finds').whereIn('visibility', ['private', 'held']).pluck('id')) as string[];
    expect(finds).toHaveLength(2);
    for (const id of finds) await visitor.get(`/api/finds/${id}`).expect(404);
    expect(await db.read('images').whereNull('observation_id')).toHaveLength(1);
  });

  it('calibrates by the micrometer to within what it says', async () => {
    const calibration = (await db.read('calibrations').first()) as {
      um_per_px_x: number;
      relative_uncertainty: number;
    };
    const true_ = (truth['stage-micrometer.jpg'] as TruePicture).umPerPxX;
    expect(Math.abs(calibration.um_per_px_x / true_ - 1)).toBeLessThan(2 * calibration.relative_uncertainty);
  });

  it('leads the gallery with the heads on bark', async () => {
    const [newest] = ((await visitor.get('/api/gallery?limit=1')).body as GalleryPage).tiles;
    expect(newest).toMatchObject({ findNumber: HEADS, title: 'Yellow heads on a sleeper', width: 1600 });
  });

  it('takes a scale from a finger, true to within what it says', async () => {
    const { observations } = await findOf('CW-4');
    const scale = observations[0]?.pictures[0]?.scale;
    expect(scale?.grounds).toBe('estimated');
    const off = Math.abs((scale?.umPerPxX ?? 0) / (truth['finger-beside-cap.jpg'] as TruePicture).umPerPxX - 1);
    expect(off).toBeLessThan(2 * (scale?.relativeUncertainty ?? 0));
  });

  it('measures heads that stand upright enough, and a cap', async () => {
    const lengths = (find: FindView, structure: string, dimension: 'lengthUm' | 'widthUm') =>
      find.series
        .filter((one) => one.structure === structure)
        .flatMap(({ bodies }) => bodies.map((body) => body[dimension]));
    const heads = lengths(await findOf(HEADS), 'other:total height', 'lengthUm');
    expect(heads).toHaveLength(5);
    for (const height of heads) expect(height).toBeGreaterThan(2000);
    const caps = lengths(await findOf('CW-4'), 'cap', 'widthUm');
    expect(caps).toHaveLength(1);
    expect(Math.abs((caps[0] ?? 0) / 3600 - 1)).toBeLessThan(0.15);
  });

  it('corrects a wrong name, and keeps it in the history', async () => {
    const find = await findOf(HEADS);
    expect(find.standing).toMatchObject({ name: { name: 'Hemitrichia clavata' }, by: { name: 'Maud Okonjo-Leigh' } });
    expect(find.determinations.map(({ name }) => name.name)).toEqual(['Hemitrichia clavata', 'Trichia varia']);
  });

  it('measures bodies to their true size, by every series', async () => {
    const series = (await Promise.all(MEASURED.map(findOf))).flatMap((find) => find.series);
    expect(series.length).toBeGreaterThanOrEqual(6);
    for (const one of series.filter(({ structure }) => structure === 'spore')) {
      const picture = await fileOf((one.bodies[0] as SeriesView['bodies'][number]).imageId);
      const bodies = picture.bodies.filter((body) => body.kind === 'spore');
      for (const body of one.bodies) {
        // pointing of 0.5 px at each end: within 5 of its standard deviations of some drawn body, by a true scale
        const px = body.lengthPx as number;
        const nearest = Math.min(...bodies.map(({ axesUm }) => Math.abs(axesUm.length / picture.umPerPxX - px)));
        expect(nearest).toBeLessThan(5 * Math.SQRT1_2);
      }
    }
  });

  it('measures what the books say that it should, by its names', async () => {
    for (const number of MEASURED) {
      const find = await findOf(number);
      for (const series of find.series) {
        for (const dimension of ['length', 'width'] as const) {
          const printed = find.publishedSizes.find(
            (size) =>
              size.taxonId === find.standing?.taxonId &&
              size.structure === series.structure &&
              size.dimension === dimension,
          );
          const values = series.bodies.flatMap((body) => (dimension === 'length' ? body.lengthUm : body.widthUm) ?? []);
          if (!printed || values.length === 0) continue;
          const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
          expect([series.structure, mean]).toEqual([
            series.structure,
            expect.toSatisfy((m: number) => m > printed.minUm * 0.97 && m < printed.maxUm * 1.03),
          ]);
        }
      }
    }
  });

  it('is filled in once', async () => {
    const before = await db.read('finds').count({ finds: '*' });
    const again = await openWithDemo({ config, log, forTests: true });
    expect(await again.read('finds').count({ finds: '*' })).toEqual(before);
    await again.close();
  });

  it('is not filled in where it is not wanted', async () => {
    const folder = newFolder();
    const empty = await openWithDemo({ config: readConfig({ DATA_DIR: folder, DEMO: 'off' }), log, forTests: true });
    expect(await empty.read('users')).toEqual([]);
    await empty.close();
    rmSync(folder, { recursive: true, force: true });
  });
});
