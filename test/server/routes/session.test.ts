import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { UserTable } from '../../../server/db/users.js';
import { DEMO_PEOPLE } from '../../../server/demo.js';
import { newId } from '../../../server/ids.js';
import { PASSWORD, TestApp } from '../../support/app.js';

describe('the session', () => {
  let server: TestApp;
  beforeEach(async () => {
    server = await TestApp.open();
  });
  afterEach(() => server.close());

  it('knows a person who signed in, and nobody after they signed out', async () => {
    const person = await server.addPerson('photographer');
    const browser = await server.signIn(person);
    expect((await browser.get('/api/session')).body).toMatchObject({ user: { id: person.id, role: 'photographer' } });
    await browser.delete('/api/session').expect(204);
    expect((await browser.get('/api/session')).body).toMatchObject({ user: null });
  });

  it('answers a wrong password and an unknown person alike', async () => {
    const person = await server.addPerson('photographer');
    const browser = await server.visit();
    const wrong = await browser.post('/api/session', { email: person.email, password: 'not this one' });
    const unknown = await browser.post('/api/session', { email: 'nobody@people.example', password: PASSWORD });
    expect([wrong.status, unknown.status]).toEqual([401, 401]);
    expect((wrong.body as { type: string }).type).toBe((unknown.body as { type: string }).type);
  });

  it('offers the sign-ins of the demo’s people only where they are, and only while the demo is on', async () => {
    const [imre] = DEMO_PEOPLE;
    if (!imre) throw new Error('The demo has nobody.');
    for (const { DEMO, offered } of [
      { DEMO: 'on', offered: [imre] },
      { DEMO: 'off', offered: [] },
    ]) {
      const other = await TestApp.open({ DEMO });
      try {
        await other.addPerson('keeper');
        const demo = async () => ((await (await other.visit()).get('/api/session')).body as { demo: unknown }).demo;
        expect(await demo()).toEqual([]);
        await new UserTable(other.db).insert({
          ...{ id: newId(), name: imre.name, role: imre.role, email: imre.email, portrait: null, fingertipMm: null },
          ...{ creditLine: imre.name, defaultLicence: 'by', createdAt: other.clock.now().toISOString() },
          passwordHash: 'never asked for here',
        });
        expect(await demo()).toEqual(offered);
      } finally {
        await other.close();
      }
    }
  });

  it('refuses a change that carries no XSRF token', async () => {
    const person = await server.addPerson('photographer');
    const browser = await server.visit();
    const answer = await browser.agent.post('/api/session').send({ email: person.email, password: PASSWORD });
    expect(answer.status).toBe(403);
    expect(answer.body).toMatchObject({ type: '/problems/stale-page' });
  });

  it('names each field that is wrong', async () => {
    const answer = await (await server.visit()).post('/api/session', { email: 'not an address' });
    expect(answer.status).toBe(422);
    expect((answer.body as { errors: { pointer: string }[] }).errors.map((error) => error.pointer)).toEqual([
      '#/email',
      '#/password',
    ]);
  });
});
