import { runInChild } from './child-process.js';
import { Refused } from './refusal.js';

const SIDE_PX = 320;
/** A portrait is a phone's photograph at most. */
const MOST_PIXELS = 60e6;
const LIMITS = { memoryBytes: 1024 ** 3, timeMs: 30_000 };

/**
 * Makes a square WebP portrait without the file's own notes, in a process of its own.
 *
 * @param source  a file that a stranger sent, of whatever kind
 * @param target  where the portrait is to lie; nothing is left there on failure
 * @param signal  aborted when nobody waits for it any more
 * @throws {Refused} saying why the file can't be read
 */
export async function makePortrait(source: string, target: string, signal?: AbortSignal): Promise<void> {
  const task = { task: 'portrait' as const, source, target, sidePx: SIDE_PX, maxPixels: MOST_PIXELS };
  const answer = await runInChild(task, LIMITS, signal);
  if (answer.done === 'refused') throw new Refused(answer.refusal.code, answer.refusal.parameters);
}
