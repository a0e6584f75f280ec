import type { Clock } from '../server/clock.js';

const DAY_MS = 24 * 60 * 60 * 1000;

/** The demo's time: it begins some weeks before the real one and is moved on as its story is told. */
export class DemoClock implements Clock {
  private at: number;

  constructor(
    private readonly real: Date,
    daysBack: number,
  ) {
    this.at = real.getTime() - daysBack * DAY_MS;
  }

  now(): Date {
    return new Date(this.at);
  }

  /** never past the real time */
  pass(days: number): void {
    this.at = Math.min(this.at + days * DAY_MS, this.real.getTime());
  }

  /** today's UTC date, YYYY-MM-DD, or one so many days away from it */
  day(away = 0): string {
    return new Date(this.at + away * DAY_MS).toISOString().slice(0, 10);
  }

  /** so many days after the real today */
  dayToCome(days: number): string {
    return new Date(this.real.getTime() + days * DAY_MS).toISOString().slice(0, 10);
  }
}
