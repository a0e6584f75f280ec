import { createHash } from 'node:crypto';
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { newId } from '../../../server/ids.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { World } from '../../support/world.js';

describe('the keeper’s desk', () => {
  let server: TestApp;
  let keeper: Person;
  let desk: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    keeper = await server.addPerson('keeper', 'Nan Thackray');
    desk = await server.signIn(keeper);
  });
  afterEach(() => server.close());

  it('lists people by name, with their role and when they were last here', async () => {
    await server.addPerson('photographer', 'Abel Moss');
    const { people } = (await desk.get('/api/keep/people').expect(200)).body as {
      people: { name: string; role: string; lastSeenAt: string | null }[];
    };
    expect(people.map(({ name, role, lastSeenAt }) => [name, role, lastSeenAt])).toEqual([
      ['Abel Moss', 'photographer', null],
      ['Nan Thackray', 'keeper', '2026-03-01T09:00:00.000Z'],
    ]);
  });

  it('changes a role, which counts from the next request on', async () => {
    const person = await server.addPerson('photographer');
    const browser = await server.signIn(person);
    await browser.get('/api/keep/people').expect(403);
    const changed = await desk.patch(`/api/keep/people/${person.id}`, { role: 'keeper' }).expect(200);
    expect(changed.body).toMatchObject({ id: person.id, role: 'keeper' });
    await browser.get('/api/keep/people').expect(200);
  });

  it('never leaves Motebook without a keeper', async () => {
    const refused = await desk.patch(`/api/keep/people/${keeper.id}`, { role: 'editor' }).expect(409);
    expect(refused.body).toMatchObject({ type: '/problems/last-keeper' });
    const second = await server.addPerson('keeper');
    await desk.patch(`/api/keep/people/${keeper.id}`, { role: 'editor' }).expect(200);
    const seconds = await server.signIn(second);
    await seconds.patch(`/api/keep/people/${second.id}`, { role: 'photographer' }).expect(409);
  });

  it('knows no person who is not there', async () => {
    await desk.patch('/api/keep/people/nobody', { role: 'editor' }).expect(404);
  });

  it('reads outgoing mail', async () => {
    await desk.post('/api/keep/invitations', { email: 'new@people.example', role: 'editor' }).expect(200);
    await server.app.jobs.drain();
    const [row] = (await desk.get('/api/keep/mails').expect(200)).body as { id: string }[];
    expect(row).toMatchObject({ to: 'new@people.example', sentAt: '2026-03-01T09:00:00.000Z', lastError: null });
    const mail = await desk.get(`/api/keep/mails/${row?.id}`).expect(200);
    expect((mail.body as { text: string }).text).toMatch(/http:\/\/localhost:3000\/invitation\/[\w-]{43}/);
    await desk.get('/api/keep/mails/none').expect(404);
  });

  it('lists jobs, what was given up first, and takes it up again', async () => {
    const job = {
      about: 'x',
      payload: 'null',
      attempts: 5,
      run_after: '2026-02-01T00:00:00Z',
      created_at: '2026-02-01T00:00:00Z',
    };
    const [gone, done] = [newId(), newId()];
    await server.db.write('jobs').insert([
      { ...job, id: gone, kind: 'unknown', state: 'failed', last_error: 'the disk is full' },
      { ...job, id: done, kind: 'unknown', state: 'done' },
    ]);
    const list = (await desk.get('/api/keep/jobs').expect(200)).body as { id: string }[];
    expect(list.map(({ id }) => id)).toEqual([gone, done]);
    expect(list[0]).toMatchObject({ state: 'failed', attempts: 5, lastError: 'the disk is full' });
    const again = await desk.post(`/api/keep/jobs/${gone}/retry`).expect(200);
    expect(again.body).toMatchObject({ id: gone, state: 'waiting', attempts: 0 });
    await desk.post(`/api/keep/jobs/${done}/retry`).expect(404);
  });
});

describe('the check of originals', () => {
  let server: TestApp;
  beforeEach(async () => {
    server = await TestApp.open();
  });
  afterEach(() => server.close());

  it('reads every original and names those that are missing or changed', async () => {
    const world = new World(server);
    const owner = await server.addPerson('photographer');
    const sha = (bytes: string): string => createHash('sha256').update(bytes).digest('hex');
    const pathOf = (bytes: string): string =>
      join(server.config.dataDir, 'originals', sha(bytes).slice(0, 2), sha(bytes));
    for (const bytes of ['sound', 'spoilt', 'lost']) {
      mkdirSync(dirname(pathOf(bytes)), { recursive: true });
      writeFileSync(pathOf(bytes), bytes);
    }
    await world.image(owner, { sha256: sha('sound'), originalName: 'sound.jpg' });
    await world.image(owner, { sha256: sha('sound'), originalName: 'the same again.jpg' });
    const spoilt = await world.image(owner, { sha256: sha('spoilt'), originalName: 'spoilt.jpg' });
    const lost = await world.image(owner, { sha256: sha('lost'), originalName: 'lost.jpg' });
    writeFileSync(pathOf('spoilt'), 'spoiled');
    rmSync(pathOf('lost'));

    const desk = await server.signIn(await server.addPerson('keeper'));
    const view = await desk.post('/api/keep/integrity').expect(200);
    expect(view.body).toEqual({
      checkedAt: '2026-03-01T09:00:00.000Z',
      originals: 3,
      bytes: 'sound'.length + 'spoiled'.length,
      faults: [
        { imageId: spoilt, name: 'spoilt.jpg', fault: 'changed' },
        { imageId: lost, name: 'lost.jpg', fault: 'missing' },
      ],
    });
  });
});
