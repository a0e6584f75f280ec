import { existsSync } from 'node:fs';
import { readFile, rm, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Logger } from 'pino';
import { createApp } from '../server/app.js';
import type { Config } from '../server/config.js';
import { type Database, openDatabase } from '../server/db/database.js';
import { UserTable } from '../server/db/users.js';
import { DEMO_PEOPLE } from '../server/demo.js';
import { newId } from '../server/ids.js';
import { Passwords } from '../server/passwords.js';
import type { Role } from '../shared/permission/can.js';
import { DemoClock } from './demo-clock.js';
import { tellFinds } from './demo-finds.js';
import { DemoTeller } from './demo-teller.js';
import { fillTaxa } from './demo-taxa.js';
import type { TruePicture } from './pictures/truth.js';

/** The demo's story begins this many days before it is filled in. */
const DAYS_BACK = 40;

/** The finger in the photographer's picture is 13.8 mm broad; it was read from a ruler to half a millimetre. */
const FINGERTIP_MM = 14;

/** Lies in the data folder while the demo is being filled in: what it was cut off in is cleared and begun again. */
const MARKER = 'demo-is-being-filled-in';

export interface DemoOptions {
  readonly config: Config;
  readonly log: Logger;
  /** in tests: cheap password hashes */
  readonly forTests?: boolean;
}

/**
 * Opens the database of a data folder; where it is empty and the demo is wanted, fills the invented *Calder
 * Wick Small Life Survey* in first: through the same services, intake and jobs that people use. Nobody is
 * served meanwhile.
 */
export async function openWithDemo({ config, log, forTests = false }: DemoOptions): Promise<Database> {
  const marker = join(config.dataDir, MARKER);
  if (existsSync(marker)) {
    log.warn('The demo was cut off while it was filled in: it is begun again.');
    await clear(config.dataDir);
  }
  const db = await openDatabase(config.dataDir);
  if (!config.demo || (await new UserTable(db).list()).length > 0) return db;
  await writeFile(marker, '');
  try {
    await fill({ config, log, forTests }, db);
  } catch (error) {
    await db.close();
    throw error; // the marker stays: the next start clears what is there
  }
  await rm(marker);
  return db;
}

async function fill({ config, log, forTests = false }: DemoOptions, db: Database): Promise<void> {
  const started = Date.now();
  log.info('Filling in the demo, once: the Calder Wick Small Life Survey.');
  const clock = new DemoClock(new Date(), DAYS_BACK);
  const folder = seedsFolder();
  const truth = JSON.parse(await readFile(join(folder, 'pictures', 'truth.json'), 'utf8')) as Record<
    string,
    TruePicture
  >;
  const people = await addPeople(db, clock, forTests);
  await fillTaxa(db, await readFile(join(folder, 'taxa', 'published-sizes.csv'), 'utf8'), clock);

  const app = createApp({ config, db, clock, log, forTests });
  try {
    const teller = new DemoTeller({ app, db, clock, people, truth, pictures: join(folder, 'pictures', 'rendered') });
    await tellFinds(teller, (told) => log.info(`Demo: ${told}`));
    await app.rooms.gallery.page({ limit: 1 }); // the full text is there when the first visitor comes
  } finally {
    await app.stop();
  }
  log.info(`The demo is filled in, in ${((Date.now() - started) / 1000).toFixed(1)} s.`);
}

/** @returns their ids by role */
async function addPeople(db: Database, clock: DemoClock, forTests: boolean): Promise<Record<Role, string>> {
  const passwords = new Passwords(forTests);
  const users = new UserTable(db);
  const ids: Partial<Record<Role, string>> = {};
  for (const { name, role, email, password } of DEMO_PEOPLE) {
    const id = (ids[role] = newId());
    await users.insert({
      ...{ id, name, role, email, portrait: null, createdAt: clock.now().toISOString() },
      fingertipMm: role === 'photographer' ? FINGERTIP_MM : null,
      creditLine: `${name}, Calder Wick Small Life Survey`,
      defaultLicence: 'by-sa',
      passwordHash: await passwords.hash(password),
    });
  }
  return ids as Record<Role, string>;
}

/** What filling in makes, by name: a data folder that holds other things keeps them, and its session secret. */
const MADE = [
  ...['motebook.sqlite', 'motebook.sqlite-wal', 'motebook.sqlite-shm'],
  ...['originals', 'renditions', 'uploads', 'portraits', 'mail'],
];

async function clear(dataDir: string): Promise<void> {
  for (const name of MADE) await rm(join(dataDir, name), { recursive: true, force: true });
  await rm(join(dataDir, MARKER));
}

/** `seeds/` of the project, whether this runs from there or from a build that holds no pictures. */
function seedsFolder(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json'))) folder = dirname(folder);
  return join(folder, 'seeds');
}
