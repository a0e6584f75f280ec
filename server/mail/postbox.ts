import type { Knex } from 'knex';
import { type Clock, instant } from '../clock.js';
import type { MailTable } from '../db/mails.js';
import { newId } from '../ids.js';
import type { Message } from './messages.js';
import type { MailTransport } from './transport.js';

/** Writes the job that sends a message into the same transaction. */
export type EnqueueMail = (trx: Knex.Transaction, mailId: string) => Promise<void>;

/** Outgoing mail: kept with whatever it is about, sent once by a job afterwards. */
export class Postbox {
  constructor(
    private readonly mails: MailTable,
    private readonly transport: MailTransport,
    private readonly clock: Clock,
    private readonly enqueue: EnqueueMail,
  ) {}

  /** Keeps a message in the caller's transaction: it goes out exactly if that is committed. */
  async post(trx: Knex.Transaction, to: string, message: Message): Promise<void> {
    const id = newId();
    await this.mails.insert({ id, to, ...message, createdAt: instant(this.clock), sentAt: null }, trx);
    await this.enqueue(trx, id);
  }

  /**
   * The job's work.
   *
   * @throws what the transport threw, after noting it for the keeper's desk; the job queue tries again later
   */
  async deliver(mailId: string): Promise<void> {
    const mail = await this.mails.find(mailId);
    if (!mail || mail.sentAt !== null) return;
    try {
      await this.transport.send(mail);
    } catch (error) {
      await this.mails.failed(mailId, error instanceof Error ? error.message : String(error));
      throw error;
    }
    await this.mails.sent(mailId, instant(this.clock));
  }
}
