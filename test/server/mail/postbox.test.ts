import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { MailTable } from '../../../server/db/mails.js';
import { passwordReset } from '../../../server/mail/messages.js';
import { Postbox } from '../../../server/mail/postbox.js';
import { LocalMail } from '../../../server/mail/transport.js';
import { TestApp } from '../../support/app.js';
import { openMailbox } from '../../support/mailbox.js';

const MESSAGE = passwordReset({
  name: 'Zoë <b>"Łukasiewicz"</b>',
  url: 'http://localhost:3000/reset/abc',
  expiresAt: '2026-03-01T10:00:00.000Z',
});

describe('outgoing mail', () => {
  let server: TestApp;
  /** what the transport does with the next messages, one entry each; then it works */
  let faults: Error[];
  beforeEach(async () => {
    faults = [];
    const local: { transport?: LocalMail } = {};
    server = await TestApp.open(
      {},
      {
        mail: {
          async send(mail) {
            const fault = faults.shift();
            if (fault) throw fault;
            await local.transport?.send(mail);
          },
        },
      },
    );
    local.transport = new LocalMail(join(server.config.dataDir, 'mail'), server.config.publicUrl);
  });
  afterEach(() => server.close());

  /** Posts as a service would, in a transaction that ends as told. */
  async function post({ commit }: { commit: boolean }): Promise<void> {
    const postbox = new Postbox(
      new MailTable(server.db),
      { send: () => Promise.resolve() },
      server.clock,
      async (trx, mailId) => {
        const now = server.clock.now().toISOString();
        const job = { kind: 'mail', about: mailId, payload: 'null', state: 'waiting', attempts: 0, run_after: now };
        await trx('jobs').insert({ ...job, id: mailId, created_at: now });
      },
    );
    const work = server.db.write.transaction(async (trx) => {
      await postbox.post(trx, 'zoe@people.example', MESSAGE);
      if (!commit) throw new Error('something else went wrong');
    });
    await (commit ? work : expect(work).rejects.toThrow('something else'));
  }

  it('is a real message that carries the same in text and in HTML', async () => {
    await post({ commit: true });
    const [mail] = await openMailbox(server);
    expect(mail?.headers.get('to')).toBe('zoe@people.example');
    expect(mail?.headers.get('from')).toBe('Motebook <motebook@localhost>');
    expect(mail?.headers.get('subject')).toBe('A new password for Motebook');
    expect(new Date(mail?.headers.get('date') ?? '').toISOString()).toBe('2026-03-01T09:00:00.000Z');
    expect(mail?.headers.get('message-id')).toMatch(/^<[0-9a-f-]{36}@localhost>$/);
    expect(mail?.text).toContain('Hello Zoë <b>"Łukasiewicz"</b>,');
    expect(mail?.text).toContain('http://localhost:3000/reset/abc');
    expect(mail?.html).toContain('Hello Zoë &lt;b&gt;&quot;Łukasiewicz&quot;&lt;/b&gt;,');
    expect(mail?.html).toContain('<a href="http://localhost:3000/reset/abc">Set a new password</a>');
    for (const form of [mail?.text, mail?.html]) expect(form).toContain('2026-03-01, 10:00 UTC');
  });

  it('is not sent when what it is about was undone', async () => {
    await post({ commit: false });
    await server.app.jobs.drain();
    expect(await new MailTable(server.db).list()).toEqual([]);
    expect(() => readdirSync(join(server.config.dataDir, 'mail'))).toThrow('ENOENT');
  });

  it('is sent once, however often its job is done', async () => {
    await post({ commit: true });
    await openMailbox(server);
    await server.db.write('jobs').update({ state: 'waiting' });
    server.clock.pass(60_000);
    expect(await openMailbox(server)).toHaveLength(1);
    expect((await new MailTable(server.db).list())[0]?.sentAt).toBe('2026-03-01T09:00:00.000Z');
  });

  it('is tried again later when it could not be handed on, and says why meanwhile', async () => {
    faults = [new Error('the disk is full')];
    await post({ commit: true });
    await server.app.jobs.drain();
    expect((await new MailTable(server.db).list())[0]).toMatchObject({ sentAt: null, lastError: 'the disk is full' });
    server.clock.pass(60_000);
    expect(await openMailbox(server)).toHaveLength(1);
    expect((await new MailTable(server.db).list())[0]).toMatchObject({
      sentAt: expect.any(String) as string,
      lastError: null,
    });
  });
});
