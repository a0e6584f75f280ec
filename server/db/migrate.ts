import { readdirSync } from 'node:fs';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { join } from 'node:path';
import knexFactory, { type Knex } from 'knex';
import { putTriggersOn, takeTriggersOff } from './triggers.js';

const FOLDER = fileURLToPath(new URL('../../migrations', import.meta.url));

/**
 * Brings the database up to date, on a connection of its own with foreign keys off: Knex rebuilds a table
 * to alter it, and with foreign keys on that deletes cascade children. Each migration is a transaction
 * that ends in a foreign-key check. Triggers are off meanwhile; see `triggers.ts`.
 */
export async function migrate(filename: string, folder = FOLDER): Promise<void> {
  const knex = knexFactory({
    client: 'better-sqlite3',
    connection: { filename },
    useNullAsDefault: true,
    pool: {
      min: 1,
      max: 1,
      afterCreate(connection: { pragma(text: string): unknown }, done: (error: Error | null, c: unknown) => void) {
        connection.pragma('foreign_keys = OFF');
        connection.pragma('journal_mode = WAL');
        done(null, connection);
      },
    },
  });
  try {
    const migrationSource = new MigrationFolder(folder);
    const [, waiting] = (await knex.migrate.list({ migrationSource })) as [unknown[], unknown[]];
    if (waiting.length > 0) await takeTriggersOff(knex);
    await knex.migrate.latest({ migrationSource });
    await putTriggersOn(knex);
  } finally {
    await knex.destroy();
  }
}

/** Migrations by name without extension, so that `.ts` under tsx and `.js` in a build are the same step. */
class MigrationFolder implements Knex.MigrationSource<string> {
  constructor(private readonly folder: string) {}

  async getMigrations(): Promise<string[]> {
    return readdirSync(this.folder)
      .filter((file) => /^\d+_.*(?<!\.d)\.(ts|js)$/.test(file))
      .map((file) => file.replace(/\.(ts|js)$/, ''))
      .sort();
  }

  getMigrationName(migration: string): string {
    return migration;
  }

  async getMigration(migration: string): Promise<Knex.Migration> {
    const file = readdirSync(this.folder).find((name) => new RegExp(`^${migration}\\.(ts|js)$`).test(name));
    if (!file) throw new Error(`Migration ${migration} is missing from ${this.folder}.`);
    const step = (await import(pathToFileURL(join(this.folder, file)).href)) as Knex.Migration;
    return { ...step, up: (knex) => checked(knex, step.up) };
  }
}

async function checked(knex: Knex, up: Knex.Migration['up']): Promise<void> {
  await up(knex);
  const orphans = (await knex.raw('pragma foreign_key_check')) as unknown[];
  if (orphans.length > 0) {
    throw new Error(
      `The migration leaves ${orphans.length} rows that point at nothing: ${JSON.stringify(orphans.slice(0, 3))}`,
    );
  }
}
