import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { newId } from '../../../server/ids.js';
import { making, pointerNote } from '../../support/builders/notes.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { World } from '../../support/world.js';

describe('the API', () => {
  let server: TestApp;
  let owner: Person;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    owner = await server.addPerson('photographer');
    browser = await server.signIn(owner);
  });
  afterEach(() => server.close());

  it('lets no cache keep an answer for anybody else, problems included', async () => {
    const findId = await new World(server).find(owner, { visibility: 'public' });
    const visitor = await server.visit();
    for (const [by, path, status] of [
      [browser, `/api/finds/${findId}`, 200],
      [visitor, `/api/finds/${findId}`, 200],
      [visitor, '/api/gallery', 200],
      [visitor, '/api/tray', 401],
      [visitor, `/api/finds/${newId()}`, 404],
    ] as const) {
      const answer = await by.get(path).expect(status);
      expect(answer.headers['cache-control'], path).toBe('private, no-cache');
    }
  });

  it('takes from people all that they drew without a connection, and from strangers no more than a form', async () => {
    const imageId = await new World(server).image(owner, { width: 6000, height: 4000 });
    const points = Array.from({ length: 2000 }, (_, i) => ({ x: i + 0.12345678901, y: i + 0.10987654321 }));
    const round = () =>
      making(pointerNote({ imageId, layer: owner.id, kind: 'round', geometry: { type: 'outline', points } }));
    const edits = Array.from({ length: 60 }, round);
    expect(JSON.stringify(edits).length).toBeGreaterThan(4e6);
    await browser.post(`/api/images/${imageId}/note-edits`, { edits }).expect(200);

    const visitor = await server.visit();
    const answer = await visitor
      .post('/api/session', { email: 'a@people.example', password: 'x'.repeat(200_000) })
      .expect(413);
    expect(answer.body).toMatchObject({ type: '/problems/too-large' });
  });
});
