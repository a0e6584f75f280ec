import { HttpErrorResponse, HttpXsrfTokenExtractor } from '@angular/common/http';
import { inject, InjectionToken } from '@angular/core';
import { defaultOptions, DetailedError, Upload } from 'tus-js-client';
import { ApiProblem, toApiProblem } from '../../../core/api-problem';
import { SessionStore } from '../../../core/session-store';

/** Where uploads go; the id of an upload is the id of its picture. */
export const UPLOADS = '/api/uploads';

export interface TransferEvents {
  /** @param sent bytes that the server has, those of an earlier try among them */
  progress(sent: number): void;
  /** the connection broke; it tries again by itself */
  heldUp(): void;
  done(imageId: string): void;
  failed(problem: ApiProblem): void;
}

export interface Transfer {
  /** Takes up where it stopped. */
  start(): void;
  /** Ends it, and takes back what was sent. */
  cancel(): void;
}

/** An upload that a closed page or a lost connection cut off. The browser cannot reopen its file by itself. */
export interface BrokenOff {
  readonly key: string;
  readonly name: string;
  readonly bytes: number;
}

/** How files travel; specs put another in its place. */
export interface Transfers {
  of(file: File, events: TransferEvents): Transfer;
  brokenOff(): Promise<readonly BrokenOff[]>;
  forget(key: string): Promise<void>;
}

export const TRANSFERS = new InjectionToken<Transfers>('transfers', {
  providedIn: 'root',
  factory: () => {
    const xsrf = inject(HttpXsrfTokenExtractor);
    const session = inject(SessionStore);
    return tusTransfers({ token: () => xsrf.getToken(), owner: () => session.user()?.id ?? '' });
  },
});

/** Waits before the next try, ms; begun anew whenever a byte got through. Then the person decides. */
const RETRY_DELAYS = [0, 1_000, 3_000, 5_000, 10_000, 20_000, 30_000];

/**
 * Resumable uploads by the tus protocol. Where an upload stopped is remembered in the browser by
 * person, name, size and date of the file, so that bringing the same file again goes on from there.
 */
function tusTransfers(who: { token(): string | null; owner(): string }): Transfers {
  const memory = defaultOptions.urlStorage;
  const prefix = () => `motebook-${who.owner()}-`;
  return {
    of(file, events) {
      const upload = new Upload(file, {
        endpoint: UPLOADS,
        metadata: { filename: file.name, filetype: file.type },
        retryDelays: RETRY_DELAYS,
        removeFingerprintOnSuccess: true, // so that the same picture brought twice is noticed, not skipped
        fingerprint: async (of) => `${prefix()}${of.name}-${of.size}-${of.lastModified}`,
        // The cookie is read for each request: signing in again replaces it.
        onBeforeRequest: (request) => request.setHeader('X-XSRF-TOKEN', who.token() ?? ''),
        onShouldRetry: (error) => {
          const again = isPassing(error.originalResponse?.getStatus() ?? 0);
          if (again) events.heldUp();
          return again;
        },
        onProgress: (sent) => events.progress(sent),
        onSuccess: () => events.done(imageIdOf(upload.url)),
        onError: (error) => events.failed(toProblem(error)),
      });
      return {
        start: () => void resume(upload),
        cancel: () => void upload.abort(true).catch(() => undefined), // what cannot be taken back, the server sweeps
      };
    },
    async brokenOff() {
      const all = await memory.findAllUploads();
      return all
        .filter(({ urlStorageKey }) => urlStorageKey.startsWith(`tus::${prefix()}`))
        .map(({ urlStorageKey, metadata, size }) => ({
          key: urlStorageKey,
          name: metadata['filename'] ?? '',
          bytes: size ?? 0,
        }));
    },
    forget: (key) => memory.removeUpload(key),
  };
}

async function resume(upload: Upload): Promise<void> {
  const [previous] = upload.url ? [] : await upload.findPreviousUploads();
  if (previous) upload.resumeFromPreviousUpload(previous);
  upload.start();
}

/** Whether waiting may help: no answer, locked by the broken connection, too often, or trouble at the server. */
function isPassing(status: number): boolean {
  return status === 0 || status === 409 || status === 423 || status === 429 || status >= 500;
}

function imageIdOf(url: string | null): string {
  return (
    url
      ?.replace(/[?#].*$/, '')
      .split('/')
      .pop() ?? ''
  );
}

function toProblem(error: Error): ApiProblem {
  if (!(error instanceof DetailedError)) return new ApiProblem('offline', 0);
  const response = error.originalResponse;
  return toApiProblem(new HttpErrorResponse({ status: response?.getStatus() ?? 0, error: response?.getBody() ?? '' }));
}
