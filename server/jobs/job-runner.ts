import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { Clock } from '../clock.js';
import type { Job, JobTable } from '../db/jobs.js';

/**
 * Does one job. A job may be begun again after a crash at any point, so doing it twice must do no harm.
 * A throw means: try again later.
 *
 * @param signal aborted when the server stops; a handler that then throws is not blamed
 */
export type JobHandler = (job: Job, signal: AbortSignal) => Promise<void>;

/** Tries, the first included, before a job is given up. */
export const MOST_ATTEMPTS = 5;
/** Longer than any handler's own limit of time: a lease that ran out means that its process is gone. */
const LEASE_MS = 15 * 60_000;
/** 10 s, 40 s, 160 s, … */
const FIRST_PAUSE_MS = 10_000;
const KEEP_DONE_MS = 7 * 24 * 60 * 60_000;
const FORGET_EVERY_MS = 60 * 60_000;
/** how often to look for work that nobody announced */
const LOOK_EVERY_MS = 2_000;

export interface JobRunnerOptions {
  readonly jobs: JobTable;
  readonly clock: Clock;
  readonly log: Logger;
  readonly handlers: Readonly<Record<string, JobHandler>>;
  /** how many of a kind may run side by side; 1 where not named */
  readonly atOnce?: Readonly<Record<string, number>>;
  /** tries of a kind, the first included, before it is given up; `MOST_ATTEMPTS` where not named */
  readonly attempts?: Readonly<Record<string, number>>;
  /** what giving a job up means for what it worked on, written in the same transaction */
  readonly givenUp?: Readonly<Record<string, (trx: Knex, job: Job) => Promise<void>>>;
}

/** Does the jobs of the table, kinds side by side, each as many at once as allowed. */
export class JobRunner {
  private readonly running = new Map<string, Set<Promise<void>>>();
  private timers: NodeJS.Timeout[] = [];
  private looking: Promise<void> | null = null;
  private lookAgain = false;
  private stopping = new AbortController();
  private started = false;

  constructor(private readonly options: JobRunnerOptions) {
    for (const kind of Object.keys(options.handlers)) this.running.set(kind, new Set());
  }

  /** Takes up what an earlier run left, then whatever comes. */
  start(): void {
    if (this.started) return;
    this.started = true;
    this.stopping = new AbortController();
    void this.options.jobs.releaseAll().then(() => {
      if (!this.started) return;
      this.timers = [setInterval(() => this.nudge(), LOOK_EVERY_MS), setInterval(() => this.forget(), FORGET_EVERY_MS)];
      this.forget();
      this.nudge();
    }, this.complain);
  }

  /** Begins no more, aborts what runs and waits for its end; what was aborted waits for the next start. */
  async stop(): Promise<void> {
    this.started = false;
    this.timers.forEach((timer) => clearInterval(timer));
    this.timers = [];
    this.stopping.abort();
    await this.looking;
    await this.idle();
  }

  /** There may be new work: call after the transaction that enqueued it. Does nothing before `start`. */
  nudge(): void {
    if (!this.started) return;
    if (this.looking) {
      this.lookAgain = true;
      return;
    }
    this.looking = this.beginDue()
      .then(() => undefined, this.complain)
      .finally(() => {
        this.looking = null;
        if (!this.lookAgain) return;
        this.lookAgain = false;
        this.nudge();
      });
  }

  /** Runs everything that is due now, and what that enqueues; for tests and for filling in the demo. */
  async drain(): Promise<void> {
    if (this.stopping.signal.aborted) this.stopping = new AbortController();
    for (;;) {
      const begun = await this.beginDue();
      await this.idle();
      if (begun === 0) return;
    }
  }

  private async beginDue(): Promise<number> {
    const { jobs, clock } = this.options;
    for (let begun = 0; ; begun++) {
      const kinds = [...this.running]
        .filter(([kind, set]) => set.size < (this.options.atOnce?.[kind] ?? 1))
        .map(([kind]) => kind);
      if (kinds.length === 0 || this.stopping.signal.aborted) return begun;
      const now = clock.now();
      const job = await jobs.lease(kinds, now.toISOString(), after(now, LEASE_MS));
      if (!job) return begun;
      const set = this.running.get(job.kind) as Set<Promise<void>>;
      const work: Promise<void> = this.attempt(job)
        .catch(this.complain)
        .finally(() => {
          set.delete(work);
          this.nudge();
        });
      set.add(work);
    }
  }

  private async attempt(job: Job): Promise<void> {
    const { jobs, clock, handlers, log } = this.options;
    const signal = this.stopping.signal;
    const most = this.options.attempts?.[job.kind] ?? MOST_ATTEMPTS;
    if (job.attempts > most) {
      // it was begun that often and never came back, which is what a job that ends the server looks like
      await this.giveUp(job, job.lastError ?? 'the server ended while it was worked on');
      return;
    }
    try {
      await (handlers[job.kind] as JobHandler)(job, signal);
      await jobs.finish(job.id, clock.now().toISOString());
    } catch (error) {
      if (signal.aborted) {
        await jobs.putBack(job.id);
        return;
      }
      const message = error instanceof Error ? error.message : String(error);
      log.warn({ err: error, job: job.id, kind: job.kind, attempts: job.attempts }, 'a job failed');
      if (job.attempts >= most) await this.giveUp(job, message);
      else await jobs.postpone(job.id, message, after(clock.now(), FIRST_PAUSE_MS * 4 ** (job.attempts - 1)));
    }
  }

  private async giveUp(job: Job, error: string): Promise<void> {
    const { jobs, clock, givenUp } = this.options;
    await jobs.giveUp(job.id, error, clock.now().toISOString(), async (trx) => {
      await givenUp?.[job.kind]?.(trx, job);
    });
  }

  /** Resolves when nothing runs. */
  private async idle(): Promise<void> {
    for (;;) {
      const work = [...this.running.values()].flatMap((set) => [...set]);
      if (work.length === 0) return;
      await Promise.all(work);
    }
  }

  private forget(): void {
    const { jobs, clock } = this.options;
    jobs.forgetDoneBefore(after(clock.now(), -KEEP_DONE_MS)).catch(this.complain);
  }

  /** The table itself failed (a full disk): the job's lease runs out, or the next start takes it up. */
  private readonly complain = (error: unknown): void => {
    this.options.log.error({ err: error }, 'the job table could not be worked on');
  };
}

function after(from: Date, ms: number): string {
  return new Date(from.getTime() + ms).toISOString();
}
