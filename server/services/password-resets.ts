import { setTimeout as wait } from 'node:timers/promises';
import type { ResetPassword } from '../../shared/contracts/session.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { SessionTable } from '../db/sessions.js';
import type { TokenTable } from '../db/tokens.js';
import type { User, UserTable } from '../db/users.js';
import { newId } from '../ids.js';
import { passwordReset } from '../mail/messages.js';
import type { Postbox } from '../mail/postbox.js';
import type { Passwords } from '../passwords.js';
import { HttpProblem } from '../problem.js';
import { hashOf, newToken } from '../tokens.js';

export const RESET_LASTS_MS = 60 * 60 * 1000;

/**
 * Asking is answered no sooner than this, whether or not the address is known: longer than writing the token and
 * the mail takes, so that the time of the answer does not tell who has an account.
 */
const ANSWER_AFTER_MS = 300;

export interface PasswordResetOptions {
  readonly db: Database;
  readonly users: UserTable;
  readonly tokens: TokenTable;
  readonly sessions: SessionTable;
  readonly postbox: Postbox;
  readonly passwords: Passwords;
  readonly clock: Clock;
  readonly publicUrl: string;
  /** replaced in tests, which have no time to lose */
  readonly pause?: (ms: number) => Promise<unknown>;
}

/** A new password by e-mail, for who has forgotten theirs. */
export class PasswordResetService {
  constructor(private readonly options: PasswordResetOptions) {}

  /** Sends a link if somebody has this address; tells the asker nothing either way. */
  async ask(email: string): Promise<void> {
    const { users, pause = wait } = this.options;
    const work = async (): Promise<void> => {
      const user = await users.findByEmail(email);
      if (user) await this.sendLink(user);
    };
    await Promise.all([work(), pause(ANSWER_AFTER_MS)]);
  }

  /**
   * Sets the password and signs the person out everywhere but here.
   *
   * @param sessionId  the session that this is asked in
   * @throws {HttpProblem} 404 `link-lapsed` for a link that was used, has lapsed or never was
   */
  async reset({ token, password }: ResetPassword, sessionId: string): Promise<void> {
    const { db, users, tokens, sessions, passwords, clock } = this.options;
    const now = instant(clock);
    const known = await tokens.openReset(hashOf(token), now);
    if (!known) throw linkLapsed();
    const passwordHash = await passwords.hash(password); // slow on purpose: not inside the transaction
    await db.write.transaction(async (trx) => {
      if (!(await tokens.use(known.id, now, trx))) throw linkLapsed();
      await users.setPasswordHash(known.userId, passwordHash, trx);
      await tokens.dropResets(known.userId, trx);
      await sessions.endAllOf(known.userId, { keep: sessionId, knex: trx });
    });
  }

  private async sendLink(user: User): Promise<void> {
    const { db, tokens, postbox, clock, publicUrl } = this.options;
    const { token, hash } = newToken();
    const expiresAt = new Date(clock.now().getTime() + RESET_LASTS_MS).toISOString();
    const reset = { id: newId(), userId: user.id, email: user.email, createdAt: instant(clock), expiresAt };
    const message = passwordReset({ name: user.name, url: `${publicUrl}/reset/${token}`, expiresAt });
    await db.write.transaction(async (trx) => {
      await tokens.insertReset(reset, hash, trx);
      await postbox.post(trx, user.email, message);
    });
  }
}

/** One answer for used, lapsed and invented links: nothing is told about which. */
export function linkLapsed(): HttpProblem {
  return new HttpProblem(404, 'link-lapsed', 'The link was used, has lapsed, or never was.');
}
