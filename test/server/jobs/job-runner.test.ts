import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Database, openDatabase } from '../../../server/db/database.js';
import { JobTable } from '../../../server/db/jobs.js';
import { JobRunner, type JobRunnerOptions, MOST_ATTEMPTS } from '../../../server/jobs/job-runner.js';
import { TestClock } from '../../support/app.js';

describe('jobs', () => {
  let folder: string;
  let db: Database;
  let jobs: JobTable;
  let clock: TestClock;
  beforeEach(async () => {
    folder = mkdtempSync(join(tmpdir(), 'motebook-jobs-'));
    db = await openDatabase(folder);
    jobs = new JobTable(db);
    clock = new TestClock();
  });
  afterEach(async () => {
    await db.close();
    rmSync(folder, { recursive: true, force: true });
  });

  const runner = (handlers: JobRunnerOptions['handlers'], more: Partial<JobRunnerOptions> = {}) =>
    new JobRunner({ jobs, clock, log: pino({ level: 'silent' }), handlers, ...more });
  const enqueue = (about: string, kind = 'walk') =>
    db.write.transaction((trx) =>
      jobs.enqueue(trx, { kind, about, payload: { about }, now: clock.now().toISOString() }),
    );
  const only = async () => (await jobs.list(1))[0];

  it('does what was enqueued, in order, once', async () => {
    const done: string[] = [];
    await enqueue('first');
    await enqueue('second');
    const run = runner({ walk: async (job) => void done.push((job.payload as { about: string }).about) });
    await run.drain();
    await run.drain();
    expect(done).toEqual(['first', 'second']);
  });

  it('exists exactly when the transaction that wrote it does', async () => {
    const failing = db.write.transaction(async (trx) => {
      await jobs.enqueue(trx, { kind: 'walk', about: 'x', now: clock.now().toISOString() });
      throw new Error('something else went wrong');
    });
    await expect(failing).rejects.toThrow('something else');
    expect(await jobs.list(10)).toEqual([]);
  });

  it('tries again later and keeps what went wrong', async () => {
    let attempts = 0;
    await enqueue('x');
    const run = runner({
      walk: async () => {
        if (++attempts === 1) throw new Error('rain');
      },
    });
    await run.drain();
    expect(await only()).toMatchObject({ state: 'waiting', attempts: 1, lastError: 'rain' });
    await run.drain();
    expect(attempts).toBe(1); // not before its time
    clock.pass(10_000);
    await run.drain();
    expect(await only()).toMatchObject({ state: 'done', attempts: 2, lastError: null });
  });

  it('gives up after its attempts, says so in the same transaction, and can be begun again', async () => {
    const givenUp: string[] = [];
    await enqueue('x');
    const failing = { walk: () => Promise.reject(new Error('no way')) };
    const run = runner(failing, { givenUp: { walk: async (_trx, job) => void givenUp.push(job.about) } });
    for (let i = 0; i < MOST_ATTEMPTS + 2; i++) {
      await run.drain();
      clock.pass(24 * 60 * 60_000);
    }
    const job = await only();
    expect(job).toMatchObject({ state: 'failed', attempts: MOST_ATTEMPTS, lastError: 'no way' });
    expect(givenUp).toEqual(['x']);
    expect(await jobs.retry(job!.id, clock.now().toISOString())).toMatchObject({ state: 'waiting', attempts: 0 });
  });

  it('takes up after a restart what was being worked on', async () => {
    const now = clock.now().toISOString();
    await enqueue('x');
    await jobs.lease(['walk'], now, '2099-01-01T00:00:00.000Z'); // and then the process is gone
    const finished = new Promise<void>((resolve) => {
      const run = runner({ walk: async () => resolve() });
      run.start();
      closing.push(run);
    });
    await finished;
    await closing[0]!.stop();
    expect(await only()).toMatchObject({ state: 'done', attempts: 2 });
  });
  const closing: JobRunner[] = [];

  it('forgets after a week what is done, and nothing else', async () => {
    await enqueue('done');
    await runner({ walk: async () => undefined }).drain();
    await enqueue('failed', 'fall');
    await runner({ fall: () => Promise.reject(new Error('no')) }, { attempts: { fall: 1 } }).drain();
    clock.pass(8 * 24 * 60 * 60_000);
    const run = runner({ other: async () => undefined });
    run.start();
    while ((await jobs.list(9)).length > 1) await new Promise((resolve) => setTimeout(resolve, 5));
    await run.stop();
    expect((await jobs.list(9)).map((job) => job.about)).toEqual(['failed']);
  });

  it('does not run a job for ever that ends the server each time', async () => {
    const now = clock.now().toISOString();
    await enqueue('x');
    for (let i = 0; i < MOST_ATTEMPTS; i++) {
      await jobs.lease(['walk'], now, '2099-01-01T00:00:00.000Z');
      await jobs.releaseAll();
    }
    let ran = false;
    await runner({ walk: async () => void (ran = true) }).drain();
    expect(ran).toBe(false);
    expect(await only()).toMatchObject({ state: 'failed' });
  });

  it('puts a job back unblamed when the server stops', async () => {
    await enqueue('x');
    let begun: () => void = () => undefined;
    const beginning = new Promise<void>((resolve) => (begun = resolve));
    const run = runner({
      walk: (_job, signal) =>
        new Promise((_resolve, reject) => {
          begun();
          signal.addEventListener('abort', () => reject(new Error('stopped')));
        }),
    });
    run.start();
    await beginning;
    await run.stop();
    expect(await only()).toMatchObject({ state: 'waiting', attempts: 0, lastError: null });
  });

  it('does not let one kind wait for another', async () => {
    await enqueue('slow', 'slow');
    await enqueue('quick', 'quick');
    let release: () => void = () => undefined;
    const gate = new Promise<void>((resolve) => (release = resolve));
    const run = runner({ slow: () => gate, quick: async () => release() });
    await run.drain(); // would never end if `quick` waited for `slow`
    expect((await jobs.list(10)).map((job) => job.state)).toEqual(['done', 'done']);
  });
});
