import type { Knex } from 'knex';
import type { Role } from '../../shared/permission/can.js';
import type { Database } from './database.js';

/** An invitation or a password reset that is still open. */
export interface Invitation {
  readonly id: string;
  /** null: the first keeper's, who is not known yet */
  readonly email: string | null;
  readonly role: Role;
  readonly madeBy: string | null;
  readonly createdAt: string;
  readonly expiresAt: string;
}

export interface Reset {
  readonly id: string;
  readonly userId: string;
  readonly email: string;
  readonly createdAt: string;
  readonly expiresAt: string;
}

interface Row {
  id: string;
  kind: 'invitation' | 'reset';
  token_hash: string;
  email: string;
  role: Role | null;
  user_id: string | null;
  made_by: string | null;
  created_at: string;
  expires_at: string;
  used_at: string | null;
}

/** Secrets that travel in links, by their hashes. */
export class TokenTable {
  constructor(private readonly db: Database) {}

  async insertInvitation({ id, ...rest }: Invitation, hash: string, knex: Knex = this.db.write): Promise<void> {
    await knex<Row>('tokens').insert({
      id,
      kind: 'invitation',
      token_hash: hash,
      email: rest.email ?? '',
      role: rest.role,
      made_by: rest.madeBy,
      created_at: rest.createdAt,
      expires_at: rest.expiresAt,
    });
  }

  async insertReset(reset: Reset, hash: string, knex: Knex = this.db.write): Promise<void> {
    await knex<Row>('tokens').insert({
      id: reset.id,
      kind: 'reset',
      token_hash: hash,
      email: reset.email,
      user_id: reset.userId,
      created_at: reset.createdAt,
      expires_at: reset.expiresAt,
    });
  }

  /** @param now instant; null for a token that nobody made, that lapsed or that was used */
  async openInvitation(hash: string, now: string, knex: Knex = this.db.read): Promise<Invitation | null> {
    const row = await open(knex, 'invitation', now).where('token_hash', hash).first();
    return row ? toInvitation(row) : null;
  }

  async openReset(hash: string, now: string, knex: Knex = this.db.read): Promise<Reset | null> {
    const row = await open(knex, 'reset', now).where('token_hash', hash).first();
    return row?.user_id
      ? { id: row.id, userId: row.user_id, email: row.email, createdAt: row.created_at, expiresAt: row.expires_at }
      : null;
  }

  /** All open ones, newest first, without the first keeper's. */
  async openInvitations(now: string): Promise<Invitation[]> {
    const rows = await open(this.db.read, 'invitation', now).whereNot('email', '').orderBy('created_at', 'desc');
    return rows.map(toInvitation);
  }

  /** @returns false when somebody else used it first */
  async use(id: string, now: string, knex: Knex): Promise<boolean> {
    return (await knex<Row>('tokens').where({ id }).whereNull('used_at').update({ used_at: now })) === 1;
  }

  /** @returns false when there is no such open invitation */
  async withdrawInvitation(id: string): Promise<boolean> {
    const invitation = { id, kind: 'invitation' as const };
    return (await this.db.write<Row>('tokens').where(invitation).whereNull('used_at').delete()) === 1;
  }

  /** A new invitation replaces the open ones to the same address (null: the first keeper's). */
  async dropInvitations(email: string | null, knex: Knex): Promise<void> {
    await knex<Row>('tokens')
      .where({ kind: 'invitation', email: email ?? '' })
      .whereNull('used_at')
      .delete();
  }

  /** After a reset, no other link that was asked for opens the account again. */
  async dropResets(userId: string, knex: Knex): Promise<void> {
    await knex<Row>('tokens').where({ kind: 'reset', user_id: userId }).whereNull('used_at').delete();
  }
}

function open(knex: Knex, kind: Row['kind'], now: string): Knex.QueryBuilder<Row, Row[]> {
  return knex<Row>('tokens').where({ kind }).whereNull('used_at').where('expires_at', '>', now);
}

function toInvitation(row: Row): Invitation {
  return {
    id: row.id,
    email: row.email === '' ? null : row.email,
    role: row.role ?? 'photographer',
    madeBy: row.made_by,
    createdAt: row.created_at,
    expiresAt: row.expires_at,
  };
}
