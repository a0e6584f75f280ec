import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { TestApp } from '../../support/app.js';

const HOUR_MS = 60 * 60 * 1000;

describe('when a person was last here', () => {
  let server: TestApp;
  beforeEach(async () => {
    server = await TestApp.open();
  });
  afterEach(() => server.close());

  it('is written down once a day', async () => {
    const person = await server.addPerson('photographer');
    const lastSeen = async (): Promise<unknown> =>
      ((await server.db.read('users').where({ id: person.id }).first()) as { last_seen_at: unknown }).last_seen_at;
    expect(await lastSeen()).toBeNull();
    const browser = await server.signIn(person); // at 09:00
    await browser.get('/api/session');
    expect(await lastSeen()).toBe('2026-03-01T09:00:00.000Z');
    server.clock.pass(14 * HOUR_MS);
    await browser.get('/api/session');
    expect(await lastSeen()).toBe('2026-03-01T09:00:00.000Z');
    server.clock.pass(2 * HOUR_MS);
    await browser.get('/api/session');
    expect(await lastSeen()).toBe('2026-03-02T01:00:00.000Z');
  });
});
