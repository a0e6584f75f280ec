import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TaxonName, TaxonView } from '../../../shared/contracts/taxa.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { addTaxon, determine, makeFind } from '../../support/builders/finds.js';
import { addPicture } from '../../support/builders/pictures.js';

describe('the list of names', () => {
  let server: TestApp;
  let person: Person;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    person = await server.addPerson('photographer');
    browser = await server.signIn(person);
  });
  afterEach(() => server.close());

  it('counts the public pictures of each name and everything below it', async () => {
    const family = await addTaxon(browser, 'Trichiaceae', { rank: 'family' });
    const genus = await addTaxon(browser, 'Trichia', { rank: 'genus', parentId: family.id });
    const varia = await addTaxon(browser, 'Trichia varia', { parentId: genus.id });
    const other = await addTaxon(browser, 'Trichia decipiens', { parentId: genus.id });
    for (const [taxon, pictures, visibility] of [
      [varia, 2, 'public'],
      [genus, 1, 'public'],
      [varia, 1, 'private'],
      [other, 1, 'group'],
    ] as const) {
      const ids = [];
      for (let i = 0; i < pictures; i++) ids.push(await addPicture(server, { ownerId: person.id }));
      await determine(browser, (await makeFind(browser, ids, { visibility })).id, taxon.id);
    }
    const names = (await (await server.visit()).get('/api/taxa').expect(200)).body as TaxonName[];
    expect(Object.fromEntries(names.map((name) => [name.name, name.pictures]))).toEqual({
      Trichiaceae: 3,
      Trichia: 3,
      'Trichia varia': 2,
      'Trichia decipiens': 0,
    });
    const page = (await browser.get(`/api/taxa/${genus.id}`).expect(200)).body as TaxonView;
    expect(page.above.map(({ name }) => name.name)).toEqual(['Trichiaceae']);
    expect(page.below.map(({ name, pictures }) => [name.name, pictures])).toEqual([
      ['Trichia decipiens', 0],
      ['Trichia varia', 2],
    ]);
    expect(page.pictures).toHaveLength(3);
  });

  it('leads from a synonym to the accepted name and its pictures', async () => {
    const accepted = await addTaxon(browser, 'Arcyria obvelata');
    const synonym = await addTaxon(browser, 'Arcyria nutans');
    const picture = await addPicture(server, { ownerId: person.id });
    await determine(browser, (await makeFind(browser, [picture])).id, synonym.id);
    await server.db.write('taxa').where({ id: synonym.id }).update({ accepted_id: accepted.id });
    const page = (await browser.get(`/api/taxa/${accepted.id}`)).body as TaxonView;
    expect(page.synonyms.map(({ name }) => name)).toEqual(['Arcyria nutans']);
    expect(page.pictures.map(({ id }) => id)).toEqual([picture]);
    const old = (await browser.get(`/api/taxa/${synonym.id}`)).body as TaxonView;
    expect(old.accepted).toMatchObject({ id: accepted.id });
    expect(old.pictures.map(({ id }) => id)).toEqual([picture]);
  });

  it('takes a name once, however its author is spelt', async () => {
    const first = await addTaxon(browser, 'Lycogala epidendrum');
    const again = { name: 'lycogala Epidendrum', authorship: 'L.', rank: 'species', code: 'botanical', parentId: null };
    const answer = await browser.post('/api/taxa', again).expect(409);
    expect(answer.body).toMatchObject({ type: '/problems/name-exists', parameters: { taxonId: first.id } });
    await browser.post('/api/taxa', { ...again, code: 'zoological' }).expect(200); // codes don't share names
    const genus = { name: 'Trichia', authorship: '', rank: 'genus', code: 'botanical', parentId: null };
    await browser.post('/api/taxa', genus).expect(200);
    await browser.post('/api/taxa', { ...genus, code: 'zoological' }).expect(200); // a slime mould and a snail
  });

  it('takes as parent only what is there, accepted and above', async () => {
    const species = await addTaxon(browser, 'Trichia varia');
    const synonym = await addTaxon(browser, 'Stemonitis', { rank: 'genus' });
    await server.db.write('taxa').where({ id: synonym.id }).update({ accepted_id: species.id });
    const child = { name: 'Physarum', authorship: '', rank: 'genus', code: 'botanical' };
    for (const [parentId, code] of [
      [species.id, 'rank-not-above'],
      [synonym.id, 'is-a-synonym'],
      [person.id, 'no-such-taxon'],
    ]) {
      const answer = await browser.post('/api/taxa', { ...child, parentId }).expect(422);
      expect(answer.body).toMatchObject({ errors: [{ pointer: '#/parentId', code }] });
    }
  });

  it('is read by everybody and added to by people', async () => {
    const visitor = await server.visit();
    await visitor.get('/api/taxa').expect(200);
    await visitor.get(`/api/taxa/${person.id}`).expect(404);
    await visitor
      .post('/api/taxa', { name: 'A', authorship: '', rank: 'genus', code: 'botanical', parentId: null })
      .expect(401);
  });
});
