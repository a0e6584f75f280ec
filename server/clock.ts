/** The time as services see it, so that tests can set it. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** The instant as ISO 8601 UTC text, as every table keeps it. */
export function instant(clock: Clock): string {
  return clock.now().toISOString();
}

/** Today's UTC date, YYYY-MM-DD. */
export function today(clock: Clock): string {
  return instant(clock).slice(0, 10);
}
