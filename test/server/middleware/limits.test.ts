import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { PASSWORD, TestApp } from '../../support/app.js';

const NOBODY = 'nobody@people.example';

describe('tries', () => {
  let server: TestApp;
  beforeEach(async () => {
    const limits = { signIn: 2, signInAnywhere: 5, askReset: 2, askResetAnywhere: 4, links: 3 };
    server = await TestApp.open({}, { limits });
  });
  afterEach(() => server.close());

  async function statuses(times: number, ask: (i: number) => PromiseLike<{ status: number }>): Promise<number[]> {
    const found: number[] = [];
    for (let i = 0; i < times; i++) found.push((await ask(i)).status);
    return found;
  }

  it('of one person’s password end, and say when to try again', async () => {
    const person = await server.addPerson('photographer');
    const browser = await server.visit();
    const wrong = { email: person.email, password: 'not this one' };
    expect(await statuses(2, () => browser.post('/api/session', wrong))).toEqual([401, 401]);
    const refused = await browser.post('/api/session', { email: person.email.toUpperCase(), password: PASSWORD });
    expect(refused.status).toBe(429);
    const { type, parameters } = refused.body as { type: string; parameters: { seconds: number } };
    expect(type).toBe('/problems/too-many-tries');
    expect(refused.headers['retry-after']).toBe(String(parameters.seconds));
    expect(parameters.seconds).toBeGreaterThan(0);
    expect(parameters.seconds).toBeLessThanOrEqual(15 * 60);
  });

  it('that succeed do not count', async () => {
    const person = await server.addPerson('photographer');
    const visit = async () => (await server.visit()).post('/api/session', { email: person.email, password: PASSWORD });
    expect(await statuses(4, visit)).toEqual([200, 200, 200, 200]);
  });

  it('of many people’s passwords from one place end too, for that place', async () => {
    const browser = await server.visit();
    const tries = await statuses(6, (i) =>
      browser.post('/api/session', { email: `p${i}@people.example`, password: 'x' }),
    );
    expect(tries).toEqual([401, 401, 401, 401, 401, 429]);
    const elsewhere = browser
      .post('/api/session', { email: NOBODY, password: 'x' })
      .set('X-Forwarded-For', '192.0.2.7');
    expect((await elsewhere).status).toBe(401);
  });

  it('of asking for a new password end, for one address and for one place', async () => {
    const browser = await server.visit();
    const ask = (email: string) => browser.post('/api/password-resets', { email });
    expect(await statuses(3, () => ask(NOBODY))).toEqual([204, 204, 429]);
    expect(await statuses(2, (i) => ask(`p${i}@people.example`))).toEqual([204, 429]);
  });

  it('of links end', async () => {
    const browser = await server.visit();
    const reset = { token: 'guessed', password: PASSWORD };
    expect(await statuses(2, () => browser.put('/api/password-resets', reset))).toEqual([404, 404]);
    const accept = { token: 'guessed', name: 'A guesser', password: PASSWORD };
    expect(await statuses(2, () => browser.post('/api/invitations/accept', accept))).toEqual([404, 429]);
  });
});
