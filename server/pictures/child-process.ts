import { fork } from 'node:child_process';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import pidusage from 'pidusage';
import type { ChildAnswer, ChildTask } from './child-tasks.js';

export interface ChildLimits {
  readonly memoryBytes: number;
  readonly timeMs: number;
}

/** A 200-megapixel picture that is stored progressively wants about 1.2 GB. */
export const INTAKE_LIMITS: ChildLimits = { memoryBytes: 2 * 1024 ** 3, timeMs: 120_000 };

const LOOK_EVERY_MS = 200;

/** Compiled, a child is `.js`; under tsx and in tests it is `.ts` and needs tsx itself. */
const compiled = !import.meta.url.endsWith('.ts');
const child = fileURLToPath(new URL(compiled ? './intake-child.js' : './intake-child.ts', import.meta.url));
const execArgv = compiled ? [] : ['--import', pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href];

/**
 * Lets a process of its own do the task, and ends it when it takes too much memory or time.
 * It is given no part of the server's environment.
 *
 * @returns its answer, or a refusal `took-too-long` or `intake-failed` (out of memory) where a limit ended it
 * @throws {Error} when the process broke down by itself, or was aborted by the signal
 */
export function runInChild(task: ChildTask, limits: ChildLimits, signal?: AbortSignal): Promise<ChildAnswer> {
  return new Promise((resolve, reject) => {
    if (signal?.aborted) {
      reject(new Error('stopped'));
      return;
    }
    const running = fork(child, [], {
      execArgv,
      env: { PATH: process.env['PATH'], NODE_ENV: process.env['NODE_ENV'] },
      stdio: ['ignore', 'ignore', 'pipe', 'ipc'],
      serialization: 'json',
    });
    let answer: ChildAnswer | null = null;
    let complaint = '';
    const end = (instead: ChildAnswer): void => {
      answer ??= instead;
      running.kill('SIGKILL');
    };
    const clock = setTimeout(() => {
      end({
        done: 'refused',
        refusal: { code: 'took-too-long', parameters: { seconds: Math.round(limits.timeMs / 1000) } },
      });
    }, limits.timeMs);
    const scales = setInterval(() => {
      void memoryOf(running.pid).then((bytes) => {
        if (bytes <= limits.memoryBytes) return;
        const megabytes = Math.round(limits.memoryBytes / 1024 ** 2);
        end({ done: 'refused', refusal: { code: 'intake-failed', parameters: { reason: 'memory', megabytes } } });
      });
    }, LOOK_EVERY_MS);
    const stop = (): void => {
      running.kill('SIGKILL');
    };
    signal?.addEventListener('abort', stop, { once: true });

    running.stderr?.on('data', (chunk: Buffer) => {
      complaint = (complaint + chunk.toString()).slice(-2000);
    });
    running.once('message', (message) => {
      answer ??= message as ChildAnswer;
    });
    const over = (error: Error | null): void => {
      clearTimeout(clock);
      clearInterval(scales);
      signal?.removeEventListener('abort', stop);
      if (answer) resolve(answer);
      else reject(error ?? new Error('stopped'));
    };
    running.once('error', over);
    running.once('close', (code, killedBy) => {
      over(new Error(`The process that decodes ended with ${killedBy ?? code}: ${complaint.trim()}`));
    });
    running.send(task, (error) => {
      if (error) over(error);
    });
  });
}

/** Resident memory; 0 for a process that has ended meanwhile. */
async function memoryOf(pid: number | undefined): Promise<number> {
  if (pid === undefined) return 0;
  try {
    return (await pidusage(pid)).memory;
  } catch {
    return 0;
  }
}
