import { computed, DOCUMENT, effect, inject, Injectable, signal, untracked } from '@angular/core';
import {
  catchError,
  defer,
  EMPTY,
  filter,
  from,
  fromEvent,
  map,
  merge,
  mergeAll,
  of,
  repeat,
  startWith,
  Subject,
  switchMap,
  take,
  tap,
  timer,
  type Observable,
} from 'rxjs';
import { imageRoutes, type EditImage, type TrayPicture } from '@shared/contracts/images';
import { Api } from '../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../core/api-problem';
import { SessionStore } from '../../../core/session-store';
import { UploadQueue } from '../uploads/upload-queue';

/** While something is being taken in, the tray is looked at this often, ms. */
const LOOK_AGAIN_MS = 1_500;

/** So many changes are sent side by side. */
const AT_ONCE = 4;

/** A discarded picture can be had back for so long, ms. */
export const UNDO_MS = 7_000;

/** The pictures that wait to be sorted. */
@Injectable({ providedIn: 'root' })
export class TrayStore {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly queue = inject(UploadQueue);
  private readonly document = inject(DOCUMENT);
  private readonly asked = new Subject<void>();
  private readonly networkIsBack = this.document.defaultView ? fromEvent(this.document.defaultView, 'online') : EMPTY;
  private readonly listed = signal<readonly TrayPicture[] | null>(null);
  /** taken out already on screen, and not yet at the server */
  private readonly leaving = signal<ReadonlySet<string>>(new Set());
  private readonly pendingDiscards = new Map<string, ReturnType<typeof setTimeout>>();

  readonly problem = signal<ApiProblem | null>(null);
  /** null until the first answer */
  readonly pictures = computed(() => this.listed()?.filter(({ id }) => !this.leaving().has(id)) ?? null);
  readonly ready = computed(() => this.pictures()?.filter(({ state }) => state === 'ready') ?? []);
  readonly refused = computed(() => this.pictures()?.filter(({ state }) => state === 'refused') ?? []);
  readonly beingRead = computed(() => this.pictures()?.filter(isBeingRead) ?? []);

  constructor() {
    effect(() => {
      this.session.user();
      untracked(() => {
        this.listed.set(null);
        this.problem.set(null);
      });
    });
  }

  /**
   * Keeps the tray up to date while somebody is subscribed: at once, whenever asked, when an upload has
   * arrived, when the network is back, and again and again while anything is being read and the page is in sight.
   */
  readonly live: Observable<void> = defer(() =>
    merge(this.asked, this.queue.arrived, this.networkIsBack).pipe(
      startWith(undefined),
      switchMap(() => this.load().pipe(repeat({ delay: () => this.nextLook() }))),
      map(() => undefined),
    ),
  );

  refresh(): void {
    this.asked.next();
  }

  /** Takes up the reading of a picture again. */
  retry(picture: TrayPicture): void {
    this.api.call(imageRoutes.retry, { params: { imageId: picture.id } }).subscribe({
      next: (again) => {
        this.replace(again);
        this.refresh();
      },
      error: (error: unknown) => this.problem.set(toApiProblem(error)),
    });
  }

  /** The same change for many, shown at once; what fails is said and looked up again. */
  edit(ids: Iterable<string>, change: Pick<EditImage, 'light' | 'role'>): void {
    const chosen = new Set(ids);
    this.listed.update(
      (list) => list?.map((picture) => (chosen.has(picture.id) ? { ...picture, ...change } : picture)) ?? null,
    );
    const all = [...chosen].map((imageId) => this.api.call(imageRoutes.edit, { params: { imageId }, body: change }));
    from(all)
      .pipe(mergeAll(AT_ONCE))
      .subscribe({
        error: (error: unknown) => {
          this.problem.set(toApiProblem(error));
          this.refresh();
        },
      });
  }

  /** Takes pictures out, after a while in which `keep` has them back. */
  discard(ids: Iterable<string>): void {
    const going = [...ids];
    this.leaving.update((leaving) => new Set([...leaving, ...going]));
    going.forEach((id) =>
      this.pendingDiscards.set(
        id,
        setTimeout(() => this.discardNow(id), UNDO_MS),
      ),
    );
  }

  keep(ids: Iterable<string>): void {
    const kept = new Set(ids);
    kept.forEach((id) => {
      clearTimeout(this.pendingDiscards.get(id));
      this.pendingDiscards.delete(id);
    });
    this.leaving.update((leaving) => new Set([...leaving].filter((id) => !kept.has(id))));
  }

  /** They are in a find now. */
  tookOut(ids: Iterable<string>): void {
    const gone = new Set(ids);
    this.listed.update((list) => list?.filter(({ id }) => !gone.has(id)) ?? null);
    this.refresh();
  }

  private discardNow(imageId: string): void {
    this.pendingDiscards.delete(imageId);
    this.api.call(imageRoutes.discard, { params: { imageId } }).subscribe({
      next: () => {
        this.listed.update((list) => list?.filter(({ id }) => id !== imageId) ?? null);
        this.keep([imageId]);
      },
      error: (error: unknown) => {
        this.keep([imageId]);
        this.problem.set(toApiProblem(error));
      },
    });
  }

  private load(): Observable<readonly TrayPicture[]> {
    return this.api.call(imageRoutes.tray, {}).pipe(
      tap((pictures) => {
        this.listed.set(pictures);
        this.problem.set(null);
      }),
      catchError((error: unknown) => {
        this.problem.set(toApiProblem(error));
        return of([]);
      }),
    );
  }

  /** Emits when it is time to look again; ends without a word when there is nothing to wait for. */
  private nextLook(): Observable<unknown> {
    if (this.beingRead().length === 0) return EMPTY;
    const inSight = fromEvent(this.document, 'visibilitychange').pipe(
      startWith(null),
      filter(() => this.document.visibilityState === 'visible'),
      take(1),
    );
    return timer(LOOK_AGAIN_MS).pipe(switchMap(() => inSight));
  }

  private replace(picture: TrayPicture): void {
    this.listed.update((list) => list?.map((old) => (old.id === picture.id ? picture : old)) ?? null);
  }
}

export function isBeingRead(picture: TrayPicture): boolean {
  return picture.state === 'waiting' || picture.state === 'working';
}
