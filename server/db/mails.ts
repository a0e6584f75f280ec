import type { Knex } from 'knex';
import type { MailRow, MailView } from '../../shared/contracts/keep.js';
import type { Database } from './database.js';

/** One message on its way out, or gone. */
export interface Mail {
  readonly id: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly createdAt: string;
  /** null while it waits */
  readonly sentAt: string | null;
}

interface Row {
  id: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  created_at: string;
  sent_at: string | null;
  attempts: number;
  last_error: string | null;
}

/** How many the keeper's desk lists. */
const LISTED = 200;

export class MailTable {
  constructor(private readonly db: Database) {}

  async insert({ createdAt, sentAt, ...mail }: Mail, trx: Knex): Promise<void> {
    await trx<Row>('mails').insert({ ...mail, created_at: createdAt, sent_at: sentAt });
  }

  async find(id: string): Promise<Mail | null> {
    const row = await this.db.read<Row>('mails').where({ id }).first();
    return row ? toMail(row) : null;
  }

  async sent(id: string, at: string): Promise<void> {
    await this.db.write<Row>('mails').where({ id }).update({ sent_at: at, last_error: null }).increment('attempts', 1);
  }

  async failed(id: string, error: string): Promise<void> {
    await this.db.write<Row>('mails').where({ id }).update({ last_error: error }).increment('attempts', 1);
  }

  /** The newest, for the keeper's desk. */
  async list(): Promise<MailRow[]> {
    return (await this.db.read<Row>('mails').orderBy('id', 'desc').limit(LISTED)).map(toMailRow);
  }

  async view(id: string): Promise<MailView | null> {
    const row = await this.db.read<Row>('mails').where({ id }).first();
    return row ? { ...toMailRow(row), text: row.text } : null;
  }
}

function toMail(row: Row): Mail {
  const { id, to, subject, text, html } = row;
  return { id, to, subject, text, html, createdAt: row.created_at, sentAt: row.sent_at };
}

function toMailRow(row: Row): MailRow {
  const { id, to, subject } = row;
  return { id, to, subject, createdAt: row.created_at, sentAt: row.sent_at, lastError: row.last_error };
}
