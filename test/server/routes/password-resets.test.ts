import { createHash } from 'node:crypto';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { PASSWORD, type Person, TestApp } from '../../support/app.js';
import { openMailbox, tokenInNewestMail } from '../../support/mailbox.js';

const NEW = 'another long password';
const HOUR_MS = 60 * 60 * 1000;

describe('a forgotten password', () => {
  let server: TestApp;
  let person: Person;
  beforeEach(async () => {
    server = await TestApp.open({ PUBLIC_URL: 'http://motes.example' });
    person = await server.addPerson('photographer');
  });
  afterEach(() => server.close());

  it('is replaced by the link that was asked for, which opens once', async () => {
    const browser = await server.visit();
    await browser.post('/api/password-resets', { email: person.email.toUpperCase() }).expect(204);
    const token = await tokenInNewestMail(server);
    await browser.put('/api/password-resets', { token, password: NEW }).expect(204);
    await browser.post('/api/session', { email: person.email, password: PASSWORD }).expect(401);
    await browser.post('/api/session', { email: person.email, password: NEW }).expect(200);
    const again = await browser.put('/api/password-resets', { token, password: 'a third long password' }).expect(404);
    expect(again.body).toMatchObject({ type: '/problems/link-lapsed' });
  });

  it('is asked for with the same answer whether or not somebody has the address', async () => {
    const browser = await server.visit();
    const known = await browser.post('/api/password-resets', { email: person.email });
    const unknown = await browser.post('/api/password-resets', { email: 'nobody@people.example' });
    expect([known.status, known.text, unknown.status, unknown.text]).toEqual([204, '', 204, '']);
    const mails = await openMailbox(server);
    expect(mails.map(({ headers }) => headers.get('to'))).toEqual([person.email]);
  });

  it('signs the person out everywhere else, and nobody else', async () => {
    const other = await server.addPerson('editor');
    const [library, phone, others] = [
      await server.signIn(person),
      await server.signIn(person),
      await server.signIn(other),
    ];
    await phone.post('/api/password-resets', { email: person.email }).expect(204);
    await phone.put('/api/password-resets', { token: await tokenInNewestMail(server), password: NEW }).expect(204);
    expect((await library.get('/api/session')).body).toMatchObject({ user: null });
    expect((await phone.get('/api/session')).body).toMatchObject({ user: { id: person.id } });
    expect((await others.get('/api/session')).body).toMatchObject({ user: { id: other.id } });
  });

  it('has a link that lapses after an hour', async () => {
    const browser = await server.visit();
    await browser.post('/api/password-resets', { email: person.email }).expect(204);
    const token = await tokenInNewestMail(server);
    server.clock.pass(HOUR_MS);
    await browser.put('/api/password-resets', { token, password: NEW }).expect(404);
  });

  it('closes the other links that were asked for', async () => {
    const browser = await server.visit();
    await browser.post('/api/password-resets', { email: person.email }).expect(204);
    const first = await tokenInNewestMail(server);
    server.clock.pass(1000);
    await browser.post('/api/password-resets', { email: person.email }).expect(204);
    const second = await tokenInNewestMail(server);
    expect(second).not.toBe(first);
    await browser.put('/api/password-resets', { token: second, password: NEW }).expect(204);
    await browser.put('/api/password-resets', { token: first, password: NEW }).expect(404);
  });

  it('keeps of the token nothing but its SHA-256', async () => {
    await (await server.visit()).post('/api/password-resets', { email: person.email }).expect(204);
    const token = await tokenInNewestMail(server);
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);
    const rows = (await server.db.read('tokens').select()) as Record<string, unknown>[];
    expect(rows).toHaveLength(1);
    expect(rows[0]?.['token_hash']).toBe(createHash('sha256').update(token).digest('hex'));
    expect(JSON.stringify(rows)).not.toContain(token);
  });

  it('is not replaced by an invitation’s token', async () => {
    const keeper = await server.signIn(await server.addPerson('keeper'));
    await keeper.post('/api/keep/invitations', { email: 'new@people.example', role: 'editor' }).expect(200);
    const token = await tokenInNewestMail(server);
    await keeper.put('/api/password-resets', { token, password: NEW }).expect(404);
  });
});
