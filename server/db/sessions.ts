import type { Knex } from 'knex';
import { Store, type SessionData } from 'express-session';
import type { Clock } from '../clock.js';
import type { Database } from './database.js';

/** How far a session's end must have moved before looking at a page writes it down again. */
const TOUCH_EVERY_MS = 12 * 60 * 60 * 1000;
const DEFAULT_AGE_MS = 14 * 24 * 60 * 60 * 1000;

interface Row {
  sid: string;
  data: string;
  expires_at: string;
}

/** Sessions in the database. Errors go to the callback alone; nothing is written at each request. */
export class SessionTable extends Store {
  constructor(
    private readonly db: Database,
    private readonly clock: Clock,
  ) {
    super();
  }

  override get(sid: string, done: (error: unknown, session?: SessionData | null) => void): void {
    settle(this.read(sid), done);
  }

  override set(sid: string, session: SessionData, done: (error?: unknown) => void = () => undefined): void {
    const row = {
      sid,
      data: JSON.stringify(session),
      user_id: userIdOf(session),
      expires_at: this.endOf(session),
    };
    settle(this.write(row), done);
  }

  override destroy(sid: string, done: (error?: unknown) => void = () => undefined): void {
    settle(this.db.write('sessions').where({ sid }).delete(), done);
  }

  override touch(sid: string, session: SessionData, done: () => void = () => undefined): void {
    settle(this.prolong(sid, session), done);
  }

  /** Signs a person out everywhere but in the session `keep`. */
  async endAllOf(userId: string, { keep, knex = this.db.write }: { keep: string | null; knex?: Knex }): Promise<void> {
    await knex('sessions')
      .where({ user_id: userId })
      .whereNot('sid', keep ?? '')
      .delete();
  }

  /** Written at sign-in and sign-out alone; a good moment to clear away what has lapsed. */
  private async write(row: Row & { user_id: string | null }): Promise<void> {
    await this.db.write('sessions').insert(row).onConflict('sid').merge();
    await this.db.write('sessions').where('expires_at', '<=', this.clock.now().toISOString()).delete();
  }

  private async read(sid: string): Promise<SessionData | null> {
    const row = await this.db.read<Row>('sessions').where({ sid }).first();
    if (!row || row.expires_at <= this.clock.now().toISOString()) return null;
    return JSON.parse(row.data) as SessionData;
  }

  private async prolong(sid: string, session: SessionData): Promise<void> {
    const row = await this.db.read<Row>('sessions').where({ sid }).first();
    const end = this.endOf(session);
    if (!row || Date.parse(end) - Date.parse(row.expires_at) < TOUCH_EVERY_MS) return;
    await this.db
      .write('sessions')
      .where({ sid })
      .update({ data: JSON.stringify(session), expires_at: end });
  }

  private endOf(session: SessionData): string {
    const { expires, originalMaxAge } = session.cookie;
    if (expires) return new Date(expires).toISOString();
    return new Date(this.clock.now().getTime() + (originalMaxAge ?? DEFAULT_AGE_MS)).toISOString();
  }
}

function userIdOf(session: SessionData): string | null {
  const passport = (session as { passport?: { user?: string } }).passport;
  return passport?.user ?? null;
}

/** Hands a promise's end to a callback, exactly once. */
function settle<T>(work: PromiseLike<T>, done: (error: unknown, result?: T) => void): void {
  void Promise.resolve(work).then(
    (result) => {
      done(null, result);
    },
    (error: unknown) => {
      done(error);
    },
  );
}
