import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Database, openDatabase } from '../../server/db/database.js';
import { migrate } from '../../server/db/migrate.js';
import { takeTriggersOff } from '../../server/db/triggers.js';
import { fillEveryTable } from '../support/builders/rows.js';

const FOLDER = fileURLToPath(new URL('../../migrations', import.meta.url));

describe('migrations', () => {
  let folder: string;
  let db: Database | null = null;
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'motebook-migrations-'));
  });
  afterEach(async () => {
    await db?.close();
    db = null;
    rmSync(folder, { recursive: true, force: true });
  });

  const file = (): string => join(folder, 'motebook.sqlite');
  const open = async (): Promise<Database> => (db = await openDatabase(folder));

  /** the steps up to a name, in a folder of their own, each re-exporting the real one */
  function stepsBefore(name: string): string {
    const steps = join(folder, 'steps');
    rmSync(steps, { recursive: true, force: true });
    return writeSteps(
      steps,
      readdirSync(FOLDER).filter((step) => step.endsWith('.ts') && step < name),
    );
  }

  it('keep every row of parents and children when a step rebuilds a table', async () => {
    await migrate(file());
    await fillEveryTable(await open());
    const before = await counts(db as Database);
    await (db as Database).close();
    // as a later step would alter a parent: Knex makes a new table and drops the old one
    const steps = writeSteps(
      join(folder, 'steps'),
      readdirSync(FOLDER).filter((step) => step.endsWith('.ts')),
    );
    writeFileSync(
      join(steps, '20991231_rebuild.ts'),
      `export const up = async (knex) => {
         for (const table of ['users', 'finds', 'images', 'measurements'])
           await knex.schema.alterTable(table, (t) => { t.text('created_at_or_so').notNullable().defaultTo('x'); });
         await knex.schema.alterTable('finds', (t) => { t.text('public_words').nullable().alter(); });
       };
       export const down = async () => {};`,
    );
    await migrate(file(), steps);
    const after = await counts(await connect());
    expect(Object.keys(before).length).toBeGreaterThan(20);
    expect({ ...after, knex_migrations: 0 }).toEqual({ ...before, knex_migrations: 0 });
  });

  it('refuse to land when a step leaves rows that point at nothing, and change nothing', async () => {
    await migrate(file());
    await fillEveryTable(await open());
    const before = await counts(db as Database);
    await (db as Database).close();
    const steps = writeSteps(
      join(folder, 'steps'),
      readdirSync(FOLDER).filter((step) => step.endsWith('.ts')),
    );
    writeFileSync(
      join(steps, '20991231_orphans.ts'),
      `export const up = async (knex) => { await knex('finds').delete(); };
       export const down = async () => {};`,
    );
    await expect(migrate(file(), steps)).rejects.toThrow(/point at nothing/);
    db = await openDatabase(folder);
    expect(await counts(db)).toEqual(before);
  });

  it('bring the search in on a filled database, with what is public and nothing else', async () => {
    const steps = stepsBefore('20261201_06');
    await migrate(file(), steps);
    await fillEveryTable(await connect());
    await (db as Database).close();
    await migrate(file());
    const { SqliteGallerySearch } = await import('../../server/db/search.js');
    db = await openDatabase(folder);
    const search = new SqliteGallerySearch(db);
    await search.refresh('2026-03-01');
    expect((await search.page({ limit: 10 })).total).toBe(1);
    expect((await search.page({ limit: 10, words: 'depot' })).total).toBe(1);
    expect((await search.page({ limit: 10, words: 'secret' })).total).toBe(0);
  });

  it('let a name of a filled list stand under the other code too, and still not twice under one', async () => {
    await migrate(file(), stepsBefore('20261201_07'));
    await fillEveryTable(await connect());
    await (db as Database).close();
    const { write } = await open();
    const known = (await write('taxa').first()) as { code: string };
    await write('taxa').insert({ ...known, id: 'other', code: 'zoological' });
    await expect(write('taxa').insert({ ...known, id: 'again' })).rejects.toThrow(/UNIQUE/);
    expect(await write('determinations').count({ rows: '*' })).toEqual([{ rows: 2 }]);
  });

  it('raise the revision of what is public with each kind of change that shows', async () => {
    const { write } = await open();
    await fillEveryTable(db as Database);
    const revision = async (): Promise<number> =>
      ((await write('counters').where({ name: 'public-revision' }).first('value')) as { value: number }).value;
    const raises = async (change: () => Promise<unknown>): Promise<boolean> => {
      const before = await revision();
      await change();
      return (await revision()) > before;
    };
    expect(await raises(() => write('finds').update({ public_words: 'x' }))).toBe(true);
    expect(await raises(() => write('images').update({ title: 'x' }))).toBe(true);
    expect(await raises(() => write('observations').update({ substrate: 'x' }))).toBe(true);
    expect(await raises(() => write('determinations').update({ reason: 'x' }))).toBe(true);
    expect(await raises(() => write('taxa').update({ authorship: 'x' }))).toBe(true);
    expect(await raises(() => write('image_scales').update({ set_at: 'x' }))).toBe(true);
    expect(await raises(() => write('users').update({ name: 'x' }))).toBe(true);
    // nobody sees these
    expect(await raises(() => write('finds').update({ exact_words: 'x' }))).toBe(false);
    expect(await raises(() => write('users').update({ last_seen_at: 'x' }))).toBe(false);
    expect(await raises(() => write('images').update({ sha256: 'x' }))).toBe(false);
  });

  it('leave the triggers as they are when there is nothing to do', async () => {
    await fillEveryTable(await open());
    const state = async (): Promise<unknown> => [
      await (db as Database).read('counters').orderBy('name'),
      await (db as Database).read('gallery_entries'),
      await (db as Database).read('sqlite_master').where({ type: 'trigger' }).count({ triggers: '*' }),
    ];
    const before = await state();
    await (db as Database).close();
    await open();
    expect(await state()).toEqual(before);
  });

  it('can be taken back to nothing', async () => {
    const { write } = await open();
    await takeTriggersOff(write);
    for (const step of readdirSync(FOLDER)
      .filter((name) => name.endsWith('.ts'))
      .sort()
      .reverse()) {
      const { down } = (await import(join(FOLDER, step))) as { down(knex: Database['write']): Promise<void> };
      await down(write);
    }
    const left = (await write('sqlite_master')
      .whereNot('name', 'like', 'sqlite_%')
      .whereNot('name', 'like', 'knex_%')
      .pluck('name')) as string[];
    expect(left).toEqual([]);
  });

  /** without migrating, as `openDatabase` would */
  async function connect(): Promise<Database> {
    const { default: knex } = await import('knex');
    const write = knex({ client: 'better-sqlite3', connection: { filename: file() }, useNullAsDefault: true });
    return (db = { write, read: write, close: () => write.destroy() });
  }
});

function writeSteps(folder: string, steps: readonly string[]): string {
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(folder);
  for (const step of steps) writeFileSync(join(folder, step), `export * from ${JSON.stringify(join(FOLDER, step))};`);
  return folder;
}

/** rows of each table, by name */
async function counts({ read }: Database): Promise<Record<string, number>> {
  const tables = (await read('sqlite_master')
    .where({ type: 'table' })
    .whereNot('name', 'like', 'gallery_search%')
    .pluck('name')) as string[];
  const all: Record<string, number> = {};
  for (const table of tables) {
    const [row] = (await read(table).count({ rows: '*' })) as { rows: number }[];
    all[table] = row?.rows ?? 0;
  }
  return all;
}
