import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import knexFactory, { type Knex } from 'knex';
import { migrate } from './migrate.js';

/**
 * One writing connection and a read-only pool on the same SQLite file.
 *
 * Inside a transaction use only the transaction object: the writing pool has one connection, and a query
 * outside it would wait for itself for ever.
 */
export interface Database {
  readonly write: Knex;
  readonly read: Knex;
  close(): Promise<void>;
}

/** Opens (and migrates) the database in this data folder. */
export async function openDatabase(dataDir: string): Promise<Database> {
  mkdirSync(dataDir, { recursive: true });
  const filename = join(dataDir, 'motebook.sqlite');
  await migrate(filename);
  const write = connect(filename, { writes: true });
  await write.raw('select 1');
  const read = connect(filename, { writes: false });
  return {
    write,
    read,
    async close() {
      await Promise.all([write.destroy(), read.destroy()]);
    },
  };
}

interface RawConnection {
  pragma(text: string): unknown;
}

function connect(filename: string, { writes }: { writes: boolean }): Knex {
  return knexFactory({
    client: 'better-sqlite3',
    connection: { filename, options: { readonly: !writes } },
    useNullAsDefault: true,
    pool: {
      min: writes ? 1 : 0,
      max: writes ? 1 : 4,
      afterCreate(connection: RawConnection, done: (error: Error | null, connection: RawConnection) => void) {
        connection.pragma('busy_timeout = 5000');
        connection.pragma('foreign_keys = ON');
        if (writes) {
          connection.pragma('journal_mode = WAL');
          connection.pragma('synchronous = FULL');
        }
        done(null, connection);
      },
    },
  });
}
