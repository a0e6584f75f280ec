import type { Knex } from 'knex';
import { newId } from '../ids.js';
import type { Database } from './database.js';

export type JobState = 'waiting' | 'working' | 'done' | 'failed';

/** Work that outlives a request: it is written down with what caused it, and done later. */
export interface Job {
  readonly id: string;
  readonly kind: string;
  /** the id of what it works on */
  readonly about: string;
  /** what the handler needs besides, as JSON */
  readonly payload: unknown;
  readonly state: JobState;
  /** how many times it was begun, this time included */
  readonly attempts: number;
  readonly lastError: string | null;
  readonly createdAt: string;
}

interface Row {
  id: string;
  kind: string;
  about: string;
  payload: string;
  state: JobState;
  attempts: number;
  run_after: string;
  leased_until: string | null;
  last_error: string | null;
  created_at: string;
  finished_at: string | null;
}

/** Instants are ISO 8601 UTC text, so that they sort as text. */
export class JobTable {
  constructor(private readonly db: Database) {}

  /** Writes a job down in the caller's transaction: it exists exactly when what caused it does. */
  async enqueue(
    trx: Knex,
    job: { readonly kind: string; readonly about: string; readonly payload?: unknown; readonly now: string },
  ): Promise<string> {
    const id = newId();
    await trx<Row>('jobs').insert({
      id,
      kind: job.kind,
      about: job.about,
      payload: JSON.stringify(job.payload ?? null),
      state: 'waiting',
      attempts: 0,
      run_after: job.now,
      created_at: job.now,
    });
    return id;
  }

  /** Takes the oldest job that is due, one whose lease ran out included; null when nothing is. */
  async lease(kinds: readonly string[], now: string, until: string): Promise<Job | null> {
    const due = this.db
      .write<Row>('jobs')
      .select('id')
      .whereIn('kind', [...kinds])
      .where((either) =>
        either
          .where((q) => q.where('state', 'waiting').where('run_after', '<=', now))
          .orWhere((q) => q.where('state', 'working').where('leased_until', '<=', now)),
      )
      .orderBy('created_at')
      .orderBy('id')
      .limit(1);
    const rows = await this.db
      .write<Row>('jobs')
      .where('id', 'in', due)
      .update({ state: 'working', leased_until: until })
      .increment('attempts', 1)
      .returning('*');
    return rows[0] ? toJob(rows[0]) : null;
  }

  async finish(id: string, now: string): Promise<void> {
    await this.db
      .write<Row>('jobs')
      .where({ id })
      .update({ state: 'done', leased_until: null, last_error: null, finished_at: now });
  }

  /** Waits for its next attempt. */
  async postpone(id: string, error: string, runAfter: string): Promise<void> {
    await this.db
      .write<Row>('jobs')
      .where({ id })
      .update({ state: 'waiting', leased_until: null, last_error: error, run_after: runAfter });
  }

  /** Gives it up; `alongside` writes, in the same transaction, what that means for what it worked on. */
  async giveUp(id: string, error: string, now: string, alongside?: (trx: Knex) => Promise<void>): Promise<void> {
    await this.db.write.transaction(async (trx) => {
      await trx<Row>('jobs')
        .where({ id })
        .update({ state: 'failed', leased_until: null, last_error: error, finished_at: now });
      await alongside?.(trx);
    });
  }

  /** Back to waiting as if it had not been begun: the server stops, the job did nothing wrong. */
  async putBack(id: string): Promise<void> {
    await this.db
      .write<Row>('jobs')
      .where({ id })
      .update({ state: 'waiting', leased_until: null })
      .decrement('attempts', 1);
  }

  /** After a restart: whatever was being worked on is not any more. Its attempt counts, for it may have been the cause. */
  async releaseAll(): Promise<void> {
    await this.db.write<Row>('jobs').where({ state: 'working' }).update({ state: 'waiting', leased_until: null });
  }

  /** A failed job from the start again; null when there is no such failed job. */
  async retry(id: string, now: string): Promise<Job | null> {
    const rows = await this.db
      .write<Row>('jobs')
      .where({ id, state: 'failed' })
      .update({ state: 'waiting', attempts: 0, run_after: now, finished_at: null })
      .returning('*');
    return rows[0] ? toJob(rows[0]) : null;
  }

  /** When the next waiting job is due; null when none waits. */
  async nextDue(kinds: readonly string[]): Promise<string | null> {
    const row = await this.db
      .read<Row>('jobs')
      .whereIn('kind', [...kinds])
      .where({ state: 'waiting' })
      .min({ at: 'run_after' })
      .first();
    return (row as { at: string | null } | undefined)?.at ?? null;
  }

  /** Newest first; what is not done before what is. */
  async list(limit: number): Promise<Job[]> {
    const rows = await this.db
      .read<Row>('jobs')
      .orderByRaw(`case state when 'failed' then 0 when 'working' then 1 when 'waiting' then 2 else 3 end`)
      .orderBy('id', 'desc')
      .limit(limit);
    return rows.map(toJob);
  }

  /** Done jobs tell nothing after a while. */
  async forgetDoneBefore(instant: string): Promise<void> {
    await this.db.write<Row>('jobs').where({ state: 'done' }).where('finished_at', '<', instant).delete();
  }
}

function toJob(row: Row): Job {
  return {
    id: row.id,
    kind: row.kind,
    about: row.about,
    payload: JSON.parse(row.payload) as unknown,
    state: row.state,
    attempts: row.attempts,
    lastError: row.last_error,
    createdAt: row.created_at,
  };
}
