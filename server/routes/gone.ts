import type { Response } from 'express';

/** Aborted when whoever asked has left before the answer was there. */
export function goneSignal(res: Response): AbortSignal {
  const gone = new AbortController();
  res.once('close', () => {
    if (!res.writableFinished) gone.abort();
  });
  return gone.signal;
}

/** Runs work for an answer; null when whoever asked has left, so that there is nobody to answer. */
export async function unlessGone<T>(res: Response, work: (signal: AbortSignal) => Promise<T>): Promise<T | null> {
  const signal = goneSignal(res);
  try {
    return await work(signal);
  } catch (error) {
    if (signal.aborted) return null;
    throw error;
  }
}

/** Sends a file and waits until it is sent; whoever leaves in the middle is no error. */
export function sendFile(res: Response, path: string, headers: Record<string, string>): Promise<void> {
  return new Promise((resolve, reject) => {
    res.sendFile(path, { headers, cacheControl: false, dotfiles: 'allow' }, (error?: Error) => {
      if (error && !res.destroyed && !res.headersSent) reject(error);
      else resolve();
    });
  });
}
