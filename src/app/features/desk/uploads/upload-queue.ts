import { computed, DestroyRef, DOCUMENT, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { Subject } from 'rxjs';
import { ApiProblem } from '../../../core/api-problem';
import { SessionStore } from '../../../core/session-store';
import { HEAD_BYTES, notTaken } from './picture-files';
import { TRANSFERS, type BrokenOff, type Transfer } from './transfer';

export type UploadState = 'waiting' | 'sending' | 'held up' | 'done' | 'failed';

export interface PictureUpload {
  readonly key: number;
  readonly name: string;
  readonly bytes: number;
  readonly sent: number;
  readonly state: UploadState;
  /** known when it is done */
  readonly imageId: string | null;
  /** why it failed */
  readonly problem: ApiProblem | null;
}

/** So many files travel at once. */
const AT_ONCE = 3;

/** The files on their way in. It outlives the pages of the desk, so that one may walk about meanwhile. */
@Injectable({ providedIn: 'root' })
export class UploadQueue {
  private readonly transfers = inject(TRANSFERS);
  private readonly session = inject(SessionStore);
  private readonly window = inject(DOCUMENT).defaultView;
  private readonly files = new Map<number, File>();
  private readonly running = new Map<number, Transfer>();
  private readonly list = signal<readonly PictureUpload[]>([]);
  private lastKey = 0;

  readonly uploads = this.list.asReadonly();
  readonly active = computed(() => this.list().filter(({ state }) => state !== 'done' && state !== 'failed'));
  readonly failed = computed(() => this.list().filter(({ state }) => state === 'failed'));
  readonly done = computed(() => this.list().filter(({ state }) => state === 'done'));
  /** cut off by a closed page; bringing the same files again goes on where they stopped */
  readonly brokenOff = signal<readonly BrokenOff[]>([]);
  /** the id of each picture that has arrived */
  readonly arrived = new Subject<string>();

  /** 0 to 1 over all files that are not refused; null when none is on its way */
  readonly progress = computed(() => {
    const counted = this.list().filter(({ state }) => state !== 'failed');
    if (this.active().length === 0) return null;
    const all = counted.reduce((sum, { bytes }) => sum + bytes, 0);
    return all === 0 ? 0 : counted.reduce((sum, { sent }) => sum + sent, 0) / all;
  });

  constructor() {
    const retryHeldUp = () =>
      this.failed()
        .filter(isOffline)
        .forEach(({ key }) => this.retry(key));
    const warn = (event: Event) => event.preventDefault();
    this.window?.addEventListener('online', retryHeldUp);
    effect(() => {
      if (this.active().length > 0) this.window?.addEventListener('beforeunload', warn);
      else this.window?.removeEventListener('beforeunload', warn);
    });
    effect(() => {
      // A new person at the same browser starts with an empty queue.
      this.session.user();
      untracked(() => this.startOver());
    });
    inject(DestroyRef).onDestroy(() => {
      this.window?.removeEventListener('online', retryHeldUp);
      this.window?.removeEventListener('beforeunload', warn);
    });
  }

  /** @returns their keys, in the order of the files */
  add(files: readonly File[]): number[] {
    if (this.active().length === 0) this.list.update((list) => list.filter(({ state }) => state === 'failed'));
    const added = files.map((file) => this.enlist(file));
    this.list.update((list) => [...list, ...added]);
    this.startWaiting();
    return added.map(({ key }) => key);
  }

  upload(key: number): PictureUpload | undefined {
    return this.list().find((upload) => upload.key === key);
  }

  retry(key: number): void {
    if (!this.files.has(key)) return;
    this.change(key, { state: 'waiting', problem: null });
    this.startWaiting();
  }

  retryAll(): void {
    this.failed()
      .filter((upload) => this.canRetry(upload))
      .forEach(({ key }) => this.retry(key));
  }

  /** Takes a file out, and what of it was sent. */
  cancel(key: number): void {
    this.running.get(key)?.cancel();
    this.end(key);
    this.files.delete(key);
    this.list.update((list) => list.filter((upload) => upload.key !== key));
    this.startWaiting();
  }

  /** Whether bringing the same file again could help; not so for a file of the wrong kind. */
  canRetry(upload: PictureUpload): boolean {
    return upload.problem?.code !== 'type-not-accepted' && upload.problem?.code !== 'too-large';
  }

  async lookForBrokenOff(): Promise<void> {
    const sending = new Set(this.active().map(({ name, bytes }) => `${name}/${bytes}`));
    const all = await this.transfers.brokenOff();
    this.brokenOff.set(all.filter(({ name, bytes }) => !sending.has(`${name}/${bytes}`)));
  }

  async forgetBrokenOff(): Promise<void> {
    await Promise.all(this.brokenOff().map(({ key }) => this.transfers.forget(key)));
    this.brokenOff.set([]);
  }

  private enlist(file: File): PictureUpload {
    const key = ++this.lastKey;
    this.files.set(key, file);
    this.brokenOff.update((all) => all.filter(({ name, bytes }) => name !== file.name || bytes !== file.size));
    return { key, name: file.name, bytes: file.size, sent: 0, state: 'waiting', imageId: null, problem: null };
  }

  private startWaiting(): void {
    const waiting = this.list().filter(({ state }) => state === 'waiting');
    const free = AT_ONCE - this.running.size;
    waiting.slice(0, Math.max(0, free)).forEach(({ key }) => this.start(key));
  }

  private start(key: number): void {
    const file = this.files.get(key);
    if (!file) return;
    const transfer = this.transfers.of(file, {
      progress: (sent) => this.change(key, { sent, state: 'sending' }),
      heldUp: () => this.change(key, { state: 'held up' }),
      done: (imageId) => this.arrive(key, imageId, file.size),
      failed: (problem) => this.fail(key, problem),
    });
    this.running.set(key, transfer);
    this.change(key, { state: 'sending' });
    void refusal(file).then((problem) => {
      if (this.running.get(key) !== transfer) return; // taken out meanwhile
      if (problem) this.fail(key, problem);
      else transfer.start();
    });
  }

  private arrive(key: number, imageId: string, sent: number): void {
    this.change(key, { state: 'done', imageId, sent });
    this.files.delete(key);
    this.end(key);
    this.arrived.next(imageId);
    this.startWaiting();
  }

  private fail(key: number, problem: ApiProblem): void {
    this.change(key, { state: 'failed', problem });
    this.end(key);
    this.startWaiting();
  }

  private end(key: number): void {
    this.running.delete(key);
  }

  private startOver(): void {
    this.running.forEach((transfer) => transfer.cancel());
    this.running.clear();
    this.files.clear();
    this.list.set([]);
    this.brokenOff.set([]);
  }

  private change(key: number, change: Partial<PictureUpload>): void {
    this.list.update((list) => list.map((upload) => (upload.key === key ? { ...upload, ...change } : upload)));
  }
}

/** What is known before anything is sent. A file that cannot be read (a vanished card) is said to be so. */
async function refusal(file: File): Promise<ApiProblem | null> {
  try {
    const found = notTaken(new Uint8Array(await file.slice(0, HEAD_BYTES).arrayBuffer()));
    return found === null ? null : new ApiProblem('type-not-accepted', 415, { found });
  } catch {
    return new ApiProblem('file-not-opened', 0);
  }
}

function isOffline(upload: PictureUpload): boolean {
  return upload.problem?.code === 'offline';
}
