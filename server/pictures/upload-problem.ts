import { statfs } from 'node:fs/promises';
import type { Problem } from '../../shared/contracts/problems.js';
import { isDiskFull } from '../problem.js';

/** With less room than this a data folder is full: the database needs some to go on by itself, bytes. */
const LEAST_ROOM = 4 * 1024 ** 2;

/**
 * What an upload that failed is answered, where the protocol has no words of its own. The error's message may
 * hold paths and SQL, and is for the log.
 *
 * @param error      what the protocol's server caught: its own refusals carry a `status_code`
 * @param roomBytes  what is left on the disk: the server hides why a write failed
 * @returns null for a refusal of the protocol, which stays as it is
 */
export function uploadProblem(error: unknown, roomBytes: number): { status_code: number; body: string } | null {
  const status = typeof error === 'object' && error !== null && 'status_code' in error ? error.status_code : 500;
  if (typeof status === 'number' && status < 500) return null;
  const problem: Problem =
    roomBytes < LEAST_ROOM || isDiskFull(error)
      ? { type: '/problems/disk-full', title: 'disk full', status: 507 }
      : { type: '/problems/unexpected', title: 'unexpected', status: 500 };
  return { status_code: problem.status, body: JSON.stringify(problem) };
}

/** Room left for people on the disk of this folder, bytes. */
export async function roomIn(folder: string): Promise<number> {
  const { bavail, bsize } = await statfs(folder);
  return bavail * bsize;
}
