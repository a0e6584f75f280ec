import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { FindRow, FindView } from '../../../shared/contracts/finds.js';
import { newId } from '../../../server/ids.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { addTaxon, determine, makeFind, newFind } from '../../support/builders/finds.js';
import { addPicture } from '../../support/builders/pictures.js';

describe('a find', () => {
  let server: TestApp;
  let finder: Person;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    finder = await server.addPerson('photographer', 'Imre');
    browser = await server.signIn(finder);
  });
  afterEach(() => server.close());

  it('takes pictures from the tray and is numbered', async () => {
    const [one, other] = [
      await addPicture(server, { ownerId: finder.id }),
      await addPicture(server, { ownerId: finder.id }),
    ];
    const first = await makeFind(browser, [one]);
    const second = await makeFind(browser, [other]);
    expect([first.number, second.number]).toEqual(['CW-1', 'CW-2']);
    expect(first.observations[0]?.pictures.map((picture) => picture.id)).toEqual([one]);
    expect(first.observations[0]).toMatchObject({ substrate: 'rotten birch', observer: { name: 'Imre' } });
    expect(first.may).toEqual({ edit: true, determine: true, decide: true });
  });

  it("refuses pictures that are another's, not ready, or in a find, and makes nothing", async () => {
    const other = await server.addPerson('photographer');
    const inFind = await addPicture(server, { ownerId: finder.id });
    await makeFind(browser, [inFind]);
    const wrong = [
      await addPicture(server, { ownerId: other.id }),
      await addPicture(server, { ownerId: finder.id, state: 'working' }),
      inFind,
    ];
    for (const id of wrong) {
      const good = await addPicture(server, { ownerId: finder.id });
      const answer = await browser.post('/api/finds', newFind([good, id]));
      expect(answer.status).toBe(422);
      expect(answer.body).toMatchObject({ errors: [{ pointer: '#/imageIds', code: 'not-in-your-tray' }] });
      await makeFind(browser, [good]); // still in the tray
    }
    const mine = (await browser.get('/api/finds')).body as FindRow[];
    expect(mine.map((row) => row.number)).toEqual(['CW-4', 'CW-3', 'CW-2', 'CW-1']);
  });

  it('shows the exact place to the finder and place readers alone, and the public one generalised', async () => {
    const reader = await server.addPerson('identifier', 'Maud');
    const find = await makeFind(browser, []);
    await server.db.write('find_place_readers').insert({ find_id: find.id, user_id: reader.id });
    expect(find.exactPlace).toMatchObject({ latitude: 51.50735, words: 'third sleeper from the pit' });
    const byReader = (await (await server.signIn(reader)).get(`/api/finds/${find.id}`)).body as FindView;
    expect(byReader.exactPlace?.latitude).toBe(51.50735);
    expect(byReader.placeReaders).toEqual([{ id: reader.id, name: 'Maud' }]);

    const answer = await (await server.visit()).get(`/api/finds/${find.id}`).expect(200);
    const seen = answer.body as FindView;
    expect(seen).toMatchObject({ exactPlace: null, placeReaders: [] });
    expect(seen.publicPlace).toMatchObject({ words: 'a tram depot', latitude: 51.51, longitude: -0.13 });
    expect(answer.text).not.toMatch(/51\.507|sleeper/);
  });

  it('refuses half of a pair of coordinates', async () => {
    const place = newFind([]).place;
    const half = { ...place, exact: { ...place.exact, longitude: null } };
    const answer = await browser.post('/api/finds', newFind([], { place: half })).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ pointer: '#/place/exact/longitude', code: 'half-a-coordinate' }] });
  });

  it('that is private is not there for others', async () => {
    const find = await makeFind(browser, [], { visibility: 'private' });
    const keeper = await server.signIn(await server.addPerson('keeper'));
    await keeper.get(`/api/finds/${find.id}`).expect(404);
    await (await server.visit()).get(`/api/finds/${find.id}`).expect(404);
    expect((await keeper.get('/api/finds')).body).toEqual([]);
  });

  it('that is held is shown from its day on', async () => {
    const find = await makeFind(browser, [], { visibility: 'held', heldUntil: '2026-03-03' });
    const visitor = await server.visit();
    await visitor.get(`/api/finds/${find.id}`).expect(404);
    server.clock.pass(2 * 24 * 3600 * 1000); // 3 March, 9:00
    await visitor.get(`/api/finds/${find.id}`).expect(200);
  });

  it('can be held only until a day to come', async () => {
    for (const heldUntil of [null, '2026-03-01', '2025-12-24']) {
      const answer = await browser.post('/api/finds', newFind([], { visibility: 'held', heldUntil })).expect(422);
      expect(answer.body).toMatchObject({ errors: [{ pointer: '#/heldUntil', code: 'not-in-the-future' }] });
    }
  });

  it('is edited by its finder: place, visibility, fruit bodies', async () => {
    const find = await makeFind(browser, []);
    const place = { ...newFind([]).place, publicWords: 'a towpath', sensitivity: 'extreme' as const };
    const edited = (await browser.patch(`/api/finds/${find.id}`, { place, fruitBodies: 3 }).expect(200))
      .body as FindView;
    expect(edited).toMatchObject({
      fruitBodies: 3,
      visibility: 'public',
      publicPlace: { words: 'a towpath', latitude: null },
    });
    const held = (
      await browser.patch(`/api/finds/${find.id}`, { visibility: 'held', heldUntil: '2027-01-01' }).expect(200)
    ).body as FindView;
    expect(held).toMatchObject({ visibility: 'held', heldUntil: '2027-01-01' });
    const open = (await browser.patch(`/api/finds/${find.id}`, { visibility: 'public' }).expect(200)).body as FindView;
    expect(open.heldUntil).toBeNull();
    const other = await server.signIn(await server.addPerson('editor'));
    await other.patch(`/api/finds/${find.id}`, { fruitBodies: 9 }).expect(403);
  });

  it('says of each picture whom to credit and under which licence, also to visitors', async () => {
    const imageId = await addPicture(server, { ownerId: finder.id });
    const find = await makeFind(browser, [imageId]);
    const said = { creditLine: 'I. Waddell, Calder Wick', licence: 'by-nc-sa' };
    await browser.patch(`/api/images/${imageId}`, said).expect(200);
    const seen = (await (await server.visit()).get(`/api/finds/${find.id}`).expect(200)).body as FindView;
    expect(seen.observations[0]?.pictures).toMatchObject([{ id: imageId, ...said }]);
  });

  it('gains observations and preparations, and tells their pictures apart', async () => {
    const [field, slide] = [
      await addPicture(server, { ownerId: finder.id }),
      await addPicture(server, { ownerId: finder.id }),
    ];
    const find = await makeFind(browser, [field]);
    const observation = { kind: 'at the bench', observedOn: '2026-02-16', substrate: '', remarks: 'squash' };
    const more = (
      await browser.post(`/api/finds/${find.id}/observations`, { ...observation, imageIds: [slide] }).expect(200)
    ).body as FindView;
    const bench = more.observations[1];
    expect(bench).toMatchObject({ kind: 'at the bench', pictures: [{ id: slide }] });

    const preparation = {
      observationId: bench?.id,
      title: 'slide 1',
      part: 'spores',
      medium: 'water',
      stain: '',
      condition: 'fresh',
      imageIds: [slide],
    };
    const prepared = (await browser.post(`/api/finds/${find.id}/preparations`, preparation).expect(200))
      .body as FindView;
    expect(prepared.observations[1]?.preparations).toMatchObject([{ title: 'slide 1', medium: 'water' }]);
    expect(prepared.observations[1]?.pictures[0]?.preparationId).toBe(prepared.observations[1]?.preparations[0]?.id);

    const wrong = await browser
      .post(`/api/finds/${find.id}/preparations`, { ...preparation, title: 'slide 2', imageIds: [field] })
      .expect(422);
    expect(wrong.body).toMatchObject({ errors: [{ code: 'not-of-this-observation' }] });

    const mended = (
      await browser.patch(`/api/finds/${find.id}/observations/${bench?.id}`, { substrate: 'oak' }).expect(200)
    ).body as FindView;
    expect(mended.observations[1]).toMatchObject({ substrate: 'oak', remarks: 'squash' });
    const another = await makeFind(browser, []);
    await browser.patch(`/api/finds/${another.id}/observations/${bench?.id}`, { substrate: 'elm' }).expect(404);
  });
});

describe('the names of a find', () => {
  let server: TestApp;
  let finder: Browser;
  let identifier: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    finder = await server.signIn(await server.addPerson('photographer', 'Imre'));
    identifier = await server.signIn(await server.addPerson('identifier', 'Maud'));
  });
  afterEach(() => server.close());

  it("keep their history: the finder's first stands at once, an identifier's when the finder decides", async () => {
    const wrong = await addTaxon(finder, 'Trichia varia');
    const right = await addTaxon(finder, 'Trichia decipiens');
    const find = await makeFind(finder, []);
    await determine(finder, find.id, wrong.id);
    const two = await determine(identifier, find.id, right.id, 'cf.');
    expect(two.determinations.map((d) => [d.name.name, d.name.qualifier, d.by.name, d.stands])).toEqual([
      ['Trichia decipiens', 'cf.', 'Maud', false],
      ['Trichia varia', '', 'Imre', true],
    ]);
    const decided = (await finder.put(`/api/finds/${find.id}/standing/${two.determinations[0]?.id}`).expect(200))
      .body as FindView;
    expect(decided.standing).toMatchObject({ name: { name: 'Trichia decipiens' } });
    expect(decided.determinations).toHaveLength(2);
  });

  it("do not stand by an identifier's word alone", async () => {
    const taxon = await addTaxon(finder, 'Trichia varia');
    const find = await makeFind(finder, []);
    expect((await determine(identifier, find.id, taxon.id)).standing).toBeNull();
  });

  it('are given by the finder and identifiers, and decided by the finder alone', async () => {
    const taxon = await addTaxon(finder, 'Trichia varia');
    const find = await makeFind(finder, []);
    const given = { taxonId: taxon.id, qualifier: '', reason: 'warts', confidence: 'certain' };
    const editor = await server.signIn(await server.addPerson('editor'));
    await editor.post(`/api/finds/${find.id}/determinations`, given).expect(403);
    await (await server.visit()).post(`/api/finds/${find.id}/determinations`, given).expect(401);
    const two = await determine(identifier, find.id, taxon.id);
    await identifier.put(`/api/finds/${find.id}/standing/${two.determinations[0]?.id}`).expect(403);
  });

  it('need a reason and a taxon of the list', async () => {
    const taxon = await addTaxon(finder, 'Trichia varia');
    const find = await makeFind(finder, []);
    const path = `/api/finds/${find.id}/determinations`;
    const given = { taxonId: taxon.id, qualifier: '', reason: ' ', confidence: 'certain' };
    expect((await finder.post(path, given).expect(422)).body).toMatchObject({ errors: [{ pointer: '#/reason' }] });
    const unknown = { ...given, reason: 'warts', taxonId: find.id };
    expect((await finder.post(path, unknown).expect(422)).body).toMatchObject({ errors: [{ code: 'no-such-taxon' }] });
  });

  it('of another find cannot stand for this one', async () => {
    const taxon = await addTaxon(finder, 'Trichia varia');
    const [one, other] = [await makeFind(finder, []), await makeFind(finder, [])];
    const named = await determine(finder, other.id, taxon.id);
    await finder.put(`/api/finds/${one.id}/standing/${named.standing?.id}`).expect(404);
  });

  it('bring the published sizes of every name given, also of synonyms', async () => {
    const [accepted, synonym, other] = [
      await addTaxon(finder, 'Arcyria nutans'),
      await addTaxon(finder, 'Arcyria obvelata'),
      await addTaxon(finder, 'Trichia varia'),
    ];
    await server.db.write('taxa').where({ id: synonym.id }).update({ accepted_id: accepted.id });
    for (const [taxon, source] of [
      [accepted, 'a book'],
      [synonym, 'an older book'],
      [other, 'a third'],
    ] as const) {
      await server.db.write('published_sizes').insert({
        id: newId(),
        taxon_id: taxon.id,
        structure: 'spore',
        dimension: 'length',
        min_um: 7,
        max_um: 8,
        source,
        page: '1',
        seen: 1,
      });
    }
    const find = await makeFind(finder, []);
    const named = await determine(finder, find.id, accepted.id);
    expect(named.publishedSizes.map((size) => [size.taxonName, size.source])).toEqual([
      ['Arcyria nutans', 'a book'],
      ['Arcyria obvelata', 'an older book'],
    ]);
  });
});
