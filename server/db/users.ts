import type { Knex } from 'knex';
import type { Licence } from '../../shared/contracts/common.js';
import type { Role } from '../../shared/permission/can.js';
import type { Database } from './database.js';

export interface User {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly role: Role;
  readonly creditLine: string;
  readonly defaultLicence: Licence;
  readonly fingertipMm: number | null;
  /** file name under the data folder's `portraits/`; null without a portrait */
  readonly portrait: string | null;
  readonly createdAt: string;
  readonly lastSeenAt: string | null;
}

interface Row {
  id: string;
  email: string;
  name: string;
  role: Role;
  password_hash: string;
  credit_line: string;
  default_licence: Licence;
  fingertip_mm: number | null;
  portrait: string | null;
  created_at: string;
  last_seen_at: string | null;
}

export class UserTable {
  constructor(private readonly db: Database) {}

  async find(id: string, knex: Knex = this.db.read): Promise<User | null> {
    const row = await knex<Row>('users').where({ id }).first();
    return row ? toUser(row) : null;
  }

  /** with the password's hash, for signing in alone */
  async findByEmail(email: string, knex: Knex = this.db.read): Promise<(User & { passwordHash: string }) | null> {
    const row = await knex<Row>('users').where({ email: email.toLowerCase() }).first();
    return row ? { ...toUser(row), passwordHash: row.password_hash } : null;
  }

  async list(): Promise<User[]> {
    return (await this.db.read<Row>('users').orderBy('name')).map(toUser);
  }

  /** those of these addresses (lower case) that somebody here has */
  async emailsAmong(emails: readonly string[]): Promise<ReadonlySet<string>> {
    return new Set((await this.db.read<Row>('users').whereIn('email', emails).pluck('email')) as string[]);
  }

  async isEmpty(): Promise<boolean> {
    return (await this.db.read<Row>('users').select('id').first()) === undefined;
  }

  async countOf(role: Role, knex: Knex = this.db.read): Promise<number> {
    const row = (await knex<Row>('users').where({ role }).count({ count: '*' }).first()) as
      { count: number } | undefined;
    return row?.count ?? 0;
  }

  async insert(user: Omit<User, 'lastSeenAt'> & { passwordHash: string }, knex: Knex = this.db.write): Promise<void> {
    const { passwordHash, ...rest } = user;
    await knex('users').insert({
      ...toColumns(rest),
      id: user.id,
      created_at: user.createdAt,
      password_hash: passwordHash,
    });
  }

  async update(id: string, change: Partial<Omit<User, 'id' | 'createdAt'>>, knex: Knex = this.db.write): Promise<void> {
    await knex('users').where({ id }).update(toColumns(change));
  }

  /** @param day  UTC date of `at`: nothing is written twice on one day */
  async seen(id: string, at: string, day: string): Promise<void> {
    await this.db
      .write<Row>('users')
      .where({ id })
      .where((either) => either.whereNull('last_seen_at').orWhere('last_seen_at', '<', day))
      .update({ last_seen_at: at });
  }

  async setPasswordHash(id: string, passwordHash: string, knex: Knex = this.db.write): Promise<void> {
    await knex('users').where({ id }).update({ password_hash: passwordHash });
  }
}

function toUser(row: Row): User {
  return {
    id: row.id,
    email: row.email,
    name: row.name,
    role: row.role,
    creditLine: row.credit_line,
    defaultLicence: row.default_licence,
    fingertipMm: row.fingertip_mm,
    portrait: row.portrait,
    createdAt: row.created_at,
    lastSeenAt: row.last_seen_at,
  };
}

function toColumns(user: Partial<Omit<User, 'id' | 'createdAt'>>): Partial<Row> {
  return {
    ...(user.email !== undefined && { email: user.email.toLowerCase() }),
    ...(user.name !== undefined && { name: user.name }),
    ...(user.role !== undefined && { role: user.role }),
    ...(user.creditLine !== undefined && { credit_line: user.creditLine }),
    ...(user.defaultLicence !== undefined && { default_licence: user.defaultLicence }),
    ...(user.fingertipMm !== undefined && { fingertip_mm: user.fingertipMm }),
    ...(user.portrait !== undefined && { portrait: user.portrait }),
    ...(user.lastSeenAt !== undefined && { last_seen_at: user.lastSeenAt }),
  };
}
