import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { GalleryPage } from '../../../shared/contracts/gallery.js';
import type { Visibility } from '../../../shared/permission/can.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { addTaxon, determine, makeFind, newFind } from '../../support/builders/finds.js';
import { addPicture } from '../../support/builders/pictures.js';

describe('the gallery', () => {
  let server: TestApp;
  let finder: Person;
  let browser: Browser;
  let visitor: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    finder = await server.addPerson('photographer', 'Imre Waddell');
    browser = await server.signIn(finder);
    visitor = await server.visit();
  });
  afterEach(() => server.close());

  const page = async (query = '', by = visitor): Promise<GalleryPage> =>
    (await by.get(`/api/gallery${query}`).expect(200)).body as GalleryPage;
  const ids = async (query = '', by = visitor): Promise<string[]> =>
    (await page(query, by)).tiles.map((tile) => tile.id);
  const search = (words: string, by = visitor): Promise<string[]> => ids(`?q=${encodeURIComponent(words)}`, by);

  async function show(
    visibility: Visibility = 'public',
    heldUntil: string | null = null,
  ): Promise<{ findId: string; imageId: string }> {
    const imageId = await addPicture(server, { ownerId: finder.id, light: 'dark field' });
    return { findId: (await makeFind(browser, [imageId], { visibility, heldUntil })).id, imageId };
  }

  it('shows the newest public pictures first, page by page, each once', async () => {
    const shown: string[] = [];
    for (let i = 0; i < 7; i++) {
      shown.unshift((await show()).imageId);
      if (i % 2) server.clock.pass(60_000); // pairs share an instant
    }
    const read: string[] = [];
    let next: string | null = '';
    while (next !== null) {
      const answer: GalleryPage = await page(`?limit=3${next && `&after=${encodeURIComponent(next)}`}`);
      expect(answer.total).toBe(7);
      read.push(...answer.tiles.map((tile) => tile.id));
      next = answer.next;
    }
    expect(read).toEqual(shown);
  });

  it('goes on at the same place when newer pictures have come', async () => {
    const [a, b] = [(await show()).imageId, (await show()).imageId];
    const first = await page('?limit=1');
    expect(first.tiles.map(({ id }) => id)).toEqual([b]);
    await show();
    expect(await ids(`?limit=1&after=${encodeURIComponent(first.next as string)}`)).toEqual([a]);
  });

  it('refuses a place that no page gave out', async () => {
    const answer = await visitor.get('/api/gallery?after=nonsense').expect(422);
    expect(answer.body).toMatchObject({ errors: [{ code: 'not-a-place' }] });
  });

  it('leaves out the tray, pictures of reference, and what is not ready', async () => {
    await addPicture(server, { ownerId: finder.id });
    const { imageId } = await show();
    await server.db.write('images').where({ id: imageId }).update({ role: 'reference' });
    expect(await page()).toEqual({ tiles: [], total: 0, next: null });
  });

  it.each(['private', 'group', 'held'] as const)('says nothing of a %s find, whoever asks', async (visibility) => {
    const taxon = await addTaxon(browser, 'Trichia varia');
    const { findId } = await show(visibility, visibility === 'held' ? '2026-12-31' : null);
    await determine(browser, findId, taxon.id);
    for (const by of [visitor, browser]) {
      for (const query of ['', `?taxon=${taxon.id}`, '?q=Trichia', '?q=depot', '?q=Imre']) {
        expect(await page(query, by)).toMatchObject({ tiles: [], total: 0 });
      }
    }
  });

  it('forgets a find in the moment that it is hidden, and knows it again when it is shown', async () => {
    const { findId, imageId } = await show();
    expect(await search('depot')).toEqual([imageId]);
    await browser.patch(`/api/finds/${findId}`, { visibility: 'private' }).expect(200);
    // before anything reads the gallery
    expect(await server.db.read('gallery_entries')).toEqual([]);
    expect(await server.db.read.raw(`select rowid from gallery_search where gallery_search match 'depot'`)).toEqual([]);
    expect(await search('depot')).toEqual([]);
    await browser.patch(`/api/finds/${findId}`, { visibility: 'public' }).expect(200);
    expect(await search('depot')).toEqual([imageId]);
  });

  it('shows a held find from its day on, and tells those who keep rendered pages', async () => {
    const { imageId } = await show('held', '2026-03-05');
    expect(await ids()).toEqual([]);
    const revision = async () =>
      (await server.db.read('counters').where({ name: 'public-revision' }).first('value')) as { value: number };
    const before = await revision();
    server.clock.pass(4 * 24 * 3600 * 1000);
    expect(await search('depot')).toEqual([imageId]);
    expect((await revision()).value).toBeGreaterThan(before.value);
  });

  it('finds pictures by a taxon with everything below it, synonyms resolved', async () => {
    const family = await addTaxon(browser, 'Trichiaceae', { rank: 'family' });
    const genus = await addTaxon(browser, 'Trichia', { rank: 'genus', parentId: family.id });
    const species = await addTaxon(browser, 'Trichia varia', { parentId: genus.id });
    const synonym = await addTaxon(browser, 'Physarum varium');
    await server.db.write('taxa').where({ id: synonym.id }).update({ accepted_id: species.id });
    const elsewhere = await addTaxon(browser, 'Lycogala', { rank: 'genus' });
    const [one, two, three] = [await show(), await show(), await show()];
    await determine(browser, one.findId, species.id);
    await determine(browser, two.findId, synonym.id);
    await determine(browser, three.findId, elsewhere.id);
    for (const taxon of [family, genus, species, synonym]) {
      expect(await ids(`?taxon=${taxon.id}`)).toEqual([two.imageId, one.imageId]);
    }
    expect(await ids(`?taxon=${elsewhere.id}`)).toEqual([three.imageId]);
    expect(await ids(`?taxon=${finder.id}`)).toEqual([]);
  });

  it('finds pictures by the beginnings of words: names, synonyms, place, person, structure, substrate, light', async () => {
    const genus = await addTaxon(browser, 'Trichia', { rank: 'genus' });
    const species = await addTaxon(browser, 'Trichia varia', { parentId: genus.id });
    const synonym = await addTaxon(browser, 'Physarum nigripes');
    await server.db.write('taxa').where({ id: synonym.id }).update({ accepted_id: species.id });
    const { findId, imageId } = await show();
    await show(); // matches none of the words that are only said of the first
    await determine(browser, findId, species.id);
    await browser
      .post(`/api/images/${imageId}/series`, { structure: 'spore', edgeRule: 'outer', ornamentIncluded: null })
      .expect(200);
    for (const words of ['trich', 'VARIA', 'nigripes', 'Trichia varia depot', 'spore']) {
      expect([words, await search(words)]).toEqual([words, [imageId]]);
    }
    for (const words of ['tram depot', 'waddell', 'birch', 'dark field']) {
      expect([words, (await search(words)).length]).toEqual([words, 2]);
    }
    expect(await search('sleeper')).toEqual([]); // the exact place's words
    expect(await search('Lycogala')).toEqual([]);
  });

  it('takes signs of the search language as nothing', async () => {
    await show();
    for (const words of ['"', '***', 'names:', 'NEAR(', '-', 'a"b', "'; drop table finds; --"]) {
      await visitor.get(`/api/gallery?q=${encodeURIComponent(words)}`).expect(200);
    }
    expect(await search('***')).toEqual([]);
    expect(await search('depot AND')).toEqual([]);
  });

  it('finds a word with or without its accents', async () => {
    const place = { ...newFind([]).place, publicWords: 'Übergang' };
    const imageId = await addPicture(server, { ownerId: finder.id });
    await makeFind(browser, [imageId], { place });
    expect(await search('ubergang')).toEqual([imageId]);
    expect(await search('über')).toEqual([imageId]);
  });

  it('follows what is said anew: name, place, person', async () => {
    const { findId, imageId } = await show();
    expect(await search('depot')).toEqual([imageId]);
    const place = { ...newFind([]).place, publicWords: 'an allotment' };
    await browser.patch(`/api/finds/${findId}`, { place }).expect(200);
    expect([await search('depot'), await search('allotment')]).toEqual([[], [imageId]]);
    await server.db.write('users').where({ id: finder.id }).update({ name: 'Ida Rowan' });
    expect([await search('Waddell'), await search('Rowan')]).toEqual([[], [imageId]]);
    await server.db.write('images').where({ id: imageId }).delete();
    expect(await search('Rowan')).toEqual([]);
  });

  it('tells each tile its name, find and place', async () => {
    const species = await addTaxon(browser, 'Trichia varia');
    const { findId, imageId } = await show();
    await browser.patch(`/api/images/${imageId}`, { licence: 'by-nc' }).expect(200);
    await determine(browser, findId, species.id, 'cf.');
    expect((await page()).tiles).toMatchObject([
      {
        id: imageId,
        findId,
        findNumber: 'CW-1',
        taxonId: species.id,
        name: { name: 'Trichia varia', qualifier: 'cf.' },
        publicPlace: 'a tram depot',
        creditLine: 'Somebody',
        licence: 'by-nc',
        scale: null,
      },
    ]);
  });
});
