import { provideHttpClient } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { ApiProblem } from '../../../core/api-problem';
import { SessionStore } from '../../../core/session-store';
import { TRANSFERS, type TransferEvents } from './transfer';
import { UploadQueue } from './upload-queue';

/** Transfers that do nothing by themselves: the spec says what happens to each. */
class FakeTransfers {
  readonly made: { name: string; events: TransferEvents; started: boolean; cancelled: boolean }[] = [];
  kept = [{ key: 'tus::1', name: 'cut-off.jpg', bytes: 4 }];

  of(file: File, events: TransferEvents) {
    const one = { name: file.name, events, started: false, cancelled: false };
    this.made.push(one);
    return { start: () => void (one.started = true), cancel: () => void (one.cancelled = true) };
  }
  brokenOff = async () => this.kept;
  forget = async (key: string) => void (this.kept = this.kept.filter((one) => one.key !== key));
  named(name: string) {
    return this.made.findLast((one) => one.name === name)!;
  }
}

const JPEG = new Uint8Array([0xff, 0xd8, 0xff, 0xe0]);
const picture = (name: string, bytes: BlobPart = JPEG) => new File([bytes], name);

describe('the upload queue', () => {
  let transfers: FakeTransfers;
  let queue: UploadQueue;
  const states = () => queue.uploads().map(({ state }) => state);
  const looked = () => vi.waitFor(() => expect(transfers.made.some(({ started }) => started)).toBe(true));

  beforeEach(() => {
    transfers = new FakeTransfers();
    TestBed.configureTestingModule({ providers: [provideHttpClient(), { provide: TRANSFERS, useValue: transfers }] });
    queue = TestBed.inject(UploadQueue);
    TestBed.tick();
  });

  it('sends three files at once, and the next when one has arrived', async () => {
    queue.add(['a', 'b', 'c', 'd'].map((name) => picture(name)));
    await looked();
    expect(states()).toEqual(['sending', 'sending', 'sending', 'waiting']);

    const arrived: string[] = [];
    queue.arrived.subscribe((id) => arrived.push(id));
    transfers.named('b').events.done('id-of-b');

    expect(states()).toEqual(['sending', 'done', 'sending', 'sending']);
    expect(arrived).toEqual(['id-of-b']);
  });

  it('counts progress over the bytes of all files', async () => {
    queue.add([picture('short', JPEG), picture('long', new Uint8Array([...JPEG, ...new Uint8Array(12)]))]);
    await looked();
    transfers.named('short').events.done('x'); // 4 of 4
    transfers.named('long').events.progress(6); // of 16
    expect(queue.progress()).toBeCloseTo(10 / 20);
  });

  it('says why a text that is called .jpg is refused, without sending it', async () => {
    queue.add([picture('notes.jpg', 'just words')]);
    await vi.waitFor(() => expect(states()).toEqual(['failed']));
    const [upload] = queue.uploads();
    expect(upload?.problem?.code).toBe('type-not-accepted');
    expect(transfers.named('notes.jpg').started).toBe(false);
    expect(queue.canRetry(upload!)).toBe(false);
  });

  it('shows a broken connection as held up, and goes on', async () => {
    queue.add([picture('a')]);
    await looked();
    transfers.named('a').events.heldUp();
    expect(states()).toEqual(['held up']);
    transfers.named('a').events.progress(2);
    expect(states()).toEqual(['sending']);
  });

  it('tries a failed file again when asked', async () => {
    const [key] = queue.add([picture('a')]);
    await looked();
    transfers.named('a').events.failed(new ApiProblem('unexpected', 500));
    expect(states()).toEqual(['failed']);

    queue.retry(key!);
    await vi.waitFor(() => expect(transfers.made.filter(({ started }) => started)).toHaveLength(2));
    expect(states()).toEqual(['sending']);
    expect(queue.upload(key!)?.problem).toBeNull();
  });

  it('goes on by itself when the network is back', async () => {
    queue.add([picture('a')]);
    await looked();
    transfers.named('a').events.failed(new ApiProblem('offline', 0));
    window.dispatchEvent(new Event('online'));
    expect(states()).toEqual(['sending']);
  });

  it('takes a stopped file out, and gives its place to the next', async () => {
    const keys = queue.add(['a', 'b', 'c', 'd'].map((name) => picture(name)));
    await looked();
    queue.cancel(keys[0]!);
    expect(transfers.named('a').cancelled).toBe(true);
    expect(queue.uploads().map(({ name, state }) => [name, state])).toEqual([
      ['b', 'sending'],
      ['c', 'sending'],
      ['d', 'sending'],
    ]);
  });

  it('remembers what a closed page cut off, until the same file is brought again', async () => {
    await queue.lookForBrokenOff();
    expect(queue.brokenOff().map(({ name }) => name)).toEqual(['cut-off.jpg']);
    queue.add([picture('cut-off.jpg')]);
    expect(queue.brokenOff()).toEqual([]);
  });

  it('starts over for the next person at the same browser', async () => {
    queue.add([picture('a')]);
    await looked();
    TestBed.inject(SessionStore).take({ user: { id: 'somebody-else' } as never, demo: [] });
    TestBed.tick();
    expect(queue.uploads()).toEqual([]);
    expect(transfers.named('a').cancelled).toBe(true);
  });
});
