import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { SeriesView } from '../../../shared/contracts/series.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { makeFind } from '../../support/builders/finds.js';
import { making, sporeNote } from '../../support/builders/notes.js';
import { addPicture } from '../../support/builders/pictures.js';

const SPORE = { structure: 'spore', edgeRule: 'outer', ornamentIncluded: false };

describe('a series', () => {
  let server: TestApp;
  let observer: Person;
  let browser: Browser;
  let imageId: string;
  beforeEach(async () => {
    server = await TestApp.open();
    observer = await server.addPerson('photographer', 'Imre');
    browser = await server.signIn(observer);
    imageId = await addPicture(server, { ownerId: observer.id });
  });
  afterEach(() => server.close());

  const open = async (by: Browser, wanted: object = {}, id = imageId) =>
    (await by.post(`/api/images/${id}/series`, { ...SPORE, ...wanted }).expect(200)).body as SeriesView;

  it('needs a find', async () => {
    const answer = await browser.post(`/api/images/${imageId}/series`, SPORE).expect(409);
    expect(answer.body).toMatchObject({ type: '/problems/no-find' });
    expect((await browser.get(`/api/images/${imageId}/series`)).body).toEqual([]);
  });

  it('is opened once for a structure of a preparation by an observer', async () => {
    await makeFind(browser, [imageId]);
    const first = await open(browser);
    expect(await open(browser, { edgeRule: 'inner' })).toEqual(first);
    expect((await open(browser, { structure: 'thread' })).id).not.toBe(first.id);
    const maud = await server.signIn(await server.addPerson('identifier', 'Maud'));
    const hers = await open(maud);
    expect(hers.id).not.toBe(first.id);
    const all = (await maud.get(`/api/images/${imageId}/series`)).body as SeriesView[];
    expect(all.map((series) => [series.structure, series.observer.name, series.mayMeasure])).toEqual([
      ['spore', 'Imre', false],
      ['thread', 'Imre', false],
      ['spore', 'Maud', true],
    ]);
  });

  it('is of one preparation: pictures of another have their own', async () => {
    const other = await addPicture(server, { ownerId: observer.id });
    const find = await makeFind(browser, [imageId, other]);
    const preparation = {
      observationId: find.observations[0]?.id,
      title: 'slide 2',
      part: '',
      medium: 'water',
      stain: '',
      condition: 'fresh',
      imageIds: [other],
    };
    await browser.post(`/api/finds/${find.id}/preparations`, preparation).expect(200);
    const [one, two] = [await open(browser), await open(browser, {}, other)];
    expect([one.preparation, two.preparation?.title]).toEqual([null, 'slide 2']);
    expect((await browser.get(`/api/images/${other}/series`)).body).toMatchObject([{ id: two.id }]);
  });

  it('measures a structure of the list or one named by the observer', async () => {
    await makeFind(browser, [imageId]);
    expect((await open(browser, { structure: 'other:hilar peg' })).structure).toBe('other:hilar peg');
    const answer = await browser.post(`/api/images/${imageId}/series`, { ...SPORE, structure: 'wing' }).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ pointer: '#/structure', code: 'no-such-structure' }] });
  });

  it('is edited by its observer alone', async () => {
    await makeFind(browser, [imageId]);
    const series = await open(browser);
    const edited = (
      await browser.patch(`/api/series/${series.id}`, { edgeRule: 'middle', ornamentIncluded: null }).expect(200)
    ).body as SeriesView;
    expect(edited).toMatchObject({ edgeRule: 'middle', ornamentIncluded: null });
    const maud = await server.signIn(await server.addPerson('identifier'));
    await maud.patch(`/api/series/${series.id}`, { edgeRule: 'inner' }).expect(403);
  });

  it('is hidden with its find', async () => {
    await makeFind(browser, [imageId], { visibility: 'private' });
    const series = await open(browser);
    const visitor = await server.visit();
    await visitor.get(`/api/series/${series.id}`).expect(404);
    await visitor.get(`/api/series/${series.id}/values.csv`).expect(404);
  });

  it('is carried away as a file that says what the values are of', async () => {
    await makeFind(browser, [imageId]);
    const series = await open(browser);
    const edits = [making(sporeNote({ imageId, layer: observer.id, seriesId: series.id }))];
    await browser.post(`/api/images/${imageId}/note-edits`, { edits }).expect(200);
    await browser
      .post(`/api/images/${imageId}/scales`, { by: 'optics', pixelPitchUm: 4, magnification: 20, relay: 1, binning: 1 })
      .expect(200);
    const answer = await (await server.visit()).get(`/api/series/${series.id}/values.csv`).expect(200);
    expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(answer.headers['content-disposition']).toContain('CW-1-spore-values.csv');
    const lines = answer.text.split('\r\n');
    expect(lines).toEqual(
      expect.arrayContaining([
        'structure,spore',
        'edge rule,outer',
        'ornament,left out',
        'observer,Imre',
        'name,not named',
      ]),
    );
    const row = (lines.at(-2) as string).split(',');
    expect(Number(row[1])).toBeCloseTo(10, 9);
    expect(Number(row[5])).toBeCloseTo(1.25, 9);
    expect(row[8]).toBe('estimated');
  });
});
