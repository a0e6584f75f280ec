import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { openMailbox, tokenInNewestMail } from '../../support/mailbox.js';

const DAY_MS = 24 * 60 * 60 * 1000;
const EMAIL = 'new@people.example';
const ANSWER = { name: 'Bartlomiej Quine', password: 'a password of my own' };

describe('an invitation', () => {
  let server: TestApp;
  let keeper: Person;
  let desk: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    keeper = await server.addPerson('keeper', 'Nan Thackray');
    desk = await server.signIn(keeper);
  });
  afterEach(() => server.close());

  async function invite(role = 'identifier'): Promise<string> {
    await desk.post('/api/keep/invitations', { email: EMAIL, role }).expect(200);
    return tokenInNewestMail(server);
  }

  it('makes the person, with the role that was given, and signs in', async () => {
    const token = await invite();
    const browser = await server.visit();
    const read = await browser.get(`/api/invitations/${token}`).expect(200);
    expect(read.body).toEqual({
      email: EMAIL,
      role: 'identifier',
      invitedBy: 'Nan Thackray',
      expiresAt: '2026-03-08T09:00:00.000Z',
    });
    const accepted = await browser.post('/api/invitations/accept', { token, ...ANSWER }).expect(200);
    expect(accepted.body).toMatchObject({ user: { email: EMAIL, name: ANSWER.name, role: 'identifier' } });
    await browser
      .put('/api/me', { name: 'B. Quine', creditLine: 'B. Quine', defaultLicence: 'by', fingertipMm: 16.5 })
      .expect(200);
    expect((await browser.get('/api/session')).body).toMatchObject({ user: { name: 'B. Quine', fingertipMm: 16.5 } });
  });

  it('says in the mail who invites to what', async () => {
    await invite('editor');
    expect((await openMailbox(server)).at(-1)?.text).toContain('Nan Thackray invites you to Motebook as an editor.');
  });

  it('holds once', async () => {
    const token = await invite();
    await (await server.visit()).post('/api/invitations/accept', { token, ...ANSWER }).expect(200);
    const browser = await server.visit();
    await browser.get(`/api/invitations/${token}`).expect(404);
    const again = await browser.post('/api/invitations/accept', { token, ...ANSWER }).expect(404);
    expect(again.body).toMatchObject({ type: '/problems/link-lapsed' });
  });

  it('lapses after seven days', async () => {
    const token = await invite();
    const browser = await server.visit();
    server.clock.pass(7 * DAY_MS - 1);
    await browser.get(`/api/invitations/${token}`).expect(200);
    server.clock.pass(1);
    await browser.get(`/api/invitations/${token}`).expect(404);
    await browser.post('/api/invitations/accept', { token, ...ANSWER }).expect(404);
  });

  it('is withdrawn by the keeper', async () => {
    const token = await invite();
    const people = (await desk.get('/api/keep/people')).body as { invitations: { id: string; email: string }[] };
    expect(people.invitations.map(({ email }) => email)).toEqual([EMAIL]);
    await desk.delete(`/api/keep/invitations/${people.invitations[0]?.id}`).expect(204);
    await desk.delete(`/api/keep/invitations/${people.invitations[0]?.id}`).expect(404);
    await (await server.visit()).post('/api/invitations/accept', { token, ...ANSWER }).expect(404);
  });

  it('replaces the earlier one to the same address', async () => {
    const first = await invite('photographer');
    server.clock.pass(1000);
    const second = await invite('editor');
    const browser = await server.visit();
    await browser.get(`/api/invitations/${first}`).expect(404);
    expect((await browser.get(`/api/invitations/${second}`)).body).toMatchObject({ role: 'editor' });
  });

  it('is not made for an address that has an account, nor accepted once it has one', async () => {
    const taken = await desk.post('/api/keep/invitations', { email: keeper.email, role: 'editor' }).expect(409);
    expect(taken.body).toMatchObject({ type: '/problems/email-taken' });
    const token = await invite();
    const person = await server.addPerson('photographer');
    await server.db.write('users').where({ id: person.id }).update({ email: EMAIL });
    const late = await (await server.visit()).post('/api/invitations/accept', { token, ...ANSWER }).expect(409);
    expect(late.body).toMatchObject({ type: '/problems/email-taken' });
    expect(await server.db.read('users').where({ email: EMAIL })).toHaveLength(1);
  });

  it('is for the address that it was sent to, whatever the answer says', async () => {
    const token = await invite();
    const body = { token, ...ANSWER, email: 'somebody-else@people.example' };
    const accepted = await (await server.visit()).post('/api/invitations/accept', body).expect(200);
    expect(accepted.body).toMatchObject({ user: { email: EMAIL } });
  });
});

describe('the first keeper', () => {
  let server: TestApp;
  beforeEach(async () => {
    server = await TestApp.open({ PUBLIC_URL: 'http://motes.example/' });
  });
  afterEach(() => server.close());

  async function tokenPrinted(): Promise<string> {
    const link = await server.app.firstKeeperLink();
    expect(link).toMatch(/^http:\/\/motes\.example\/invitation\/[\w-]{43}$/);
    return link?.split('/').at(-1) ?? '';
  }

  it('comes in by the link that an empty server prints, and says their address', async () => {
    const token = await tokenPrinted();
    const browser = await server.visit();
    expect((await browser.get(`/api/invitations/${token}`)).body).toMatchObject({ email: null, role: 'keeper' });
    const without = await browser.post('/api/invitations/accept', { token, ...ANSWER }).expect(422);
    expect(without.body).toMatchObject({ errors: [{ pointer: '#/email' }] });
    await browser.post('/api/invitations/accept', { token, ...ANSWER, email: EMAIL }).expect(200);
    await browser.get('/api/keep/people').expect(200);
    expect(await server.app.firstKeeperLink()).toBeNull();
  });

  it('has one link: starting again replaces it', async () => {
    const first = await tokenPrinted();
    await tokenPrinted();
    await (await server.visit()).get(`/api/invitations/${first}`).expect(404);
  });

  it('is nobody any more once there are people', async () => {
    const token = await tokenPrinted();
    await server.addPerson('photographer');
    const body = { token, ...ANSWER, email: EMAIL };
    await (await server.visit()).post('/api/invitations/accept', body).expect(404);
  });
});
