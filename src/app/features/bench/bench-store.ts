import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import {
  catchError,
  debounceTime,
  distinctUntilChanged,
  EMPTY,
  filter,
  finalize,
  merge,
  switchMap,
  tap,
  type Observable,
} from 'rxjs';
import type { Note } from '@shared/annotations/note';
import { findRoutes } from '@shared/contracts/finds';
import { imageRoutes, type ImageView } from '@shared/contracts/images';
import type { SetScale } from '@shared/contracts/scales';
import { seriesRoutes, type BodyView, type EditSeries, type SeriesView } from '@shared/contracts/series';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { SessionStore } from '../../core/session-store';
import { LastTime } from './last-time';
import { NoteStore } from './note-store';
import { bodyOf, scaleOf, seriesFigures } from './series-figures';
import { COMMON_STRUCTURES } from './structure-keys';

/** After edits are kept: the server has computed by then, and a run of spores asks once. */
const ASK_AGAIN_MS = 600;

/** The picture on the bench, its find, its scale and its series; what is drawn lies in `NoteStore`. */
@Injectable()
export class BenchStore {
  private readonly api = inject(Api);
  private readonly notes = inject(NoteStore);
  private readonly me = inject(SessionStore).user;
  private readonly lastTime = inject(LastTime);

  readonly imageId = signal<string | undefined>(undefined);
  private readonly request = computed(() => {
    const imageId = this.imageId();
    return imageId === undefined ? undefined : { params: { imageId } };
  });
  private readonly imageAsked = this.api.resource(imageRoutes.read, () => this.request());
  readonly image = computed(() => (this.imageAsked.hasValue() ? this.imageAsked.value() : undefined));
  readonly problem = computed<ApiProblem | null>(() => {
    const error = this.imageAsked.error();
    return error ? toApiProblem(error) : null;
  });

  private readonly findAsked = this.api.resource(findRoutes.read, () => {
    const findId = this.image()?.find?.id;
    return findId === undefined ? undefined : { params: { findId } };
  });
  readonly find = computed(() => (this.findAsked.hasValue() ? this.findAsked.value() : undefined));
  /** the observation that this picture belongs to, and what lies on the slide */
  readonly observation = computed(() =>
    this.find()?.observations.find(({ pictures }) => pictures.some(({ id }) => id === this.imageId())),
  );
  readonly preparation = computed(() => {
    const id = this.image()?.preparation?.id;
    return this.observation()?.preparations.find((preparation) => preparation.id === id) ?? null;
  });

  private readonly seriesKept = signal<readonly SeriesView[]>([]);
  readonly series = this.seriesKept.asReadonly();
  readonly seriesLoaded = signal(false);
  /** what went wrong with a series, until the next try */
  readonly trouble = signal<ApiProblem | null>(null);

  readonly scale = computed(() => scaleOf(this.image()?.currentScale ?? null));
  readonly mayAnnotate = computed(() => this.image()?.may.annotate ?? false);
  readonly mayEdit = computed(() => this.image()?.may.edit ?? false);
  /** measuring needs a find, since a series belongs to one */
  readonly mayMeasure = computed(() => this.mayAnnotate() && (this.image()?.find ?? null) !== null);

  /** the structure whose series is shown; the tool follows it while one is in hand */
  readonly structure = signal<string | null>(null);
  /** series of the shown structure, the own one first */
  readonly shown = computed(() => {
    const own = this.me()?.id;
    const wanted = this.structure() ?? this.fullest();
    return this.series()
      .filter(({ structure }) => structure === wanted)
      .sort((a, b) => Number(b.observer.id === own) - Number(a.observer.id === own));
  });
  /** structures for the list, with the number of bodies in one's own series; those who only look see all */
  readonly structures = computed(() => {
    const measured = this.series()
      .filter((series) => this.bodiesOf(series).length > 0)
      .map(({ structure }) => structure);
    const shown = this.structure();
    const common = this.mayMeasure() ? COMMON_STRUCTURES : [];
    const ids = [...new Set([...common, ...measured, ...(shown ? [shown] : [])])];
    return ids.map((id) => ({ id, count: this.countOf(id) }));
  });

  constructor() {
    merge(
      toObservable(this.imageId).pipe(
        distinctUntilChanged(),
        tap(() => this.seriesLoaded.set(false)),
      ),
      this.notes.taken.pipe(debounceTime(ASK_AGAIN_MS)),
    )
      .pipe(
        switchMap(() => this.askSeries()),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  reload(): void {
    this.imageAsked.reload();
  }

  /** Of a series: measured here this moment, and by the server on its other pictures. */
  bodiesOf(series: SeriesView): readonly BodyView[] {
    const elsewhere = series.bodies.filter(({ imageId }) => imageId !== this.imageId());
    const here = this.notes.notes().filter(({ kind, seriesId }) => kind === 'measure' && seriesId === series.id);
    return [...elsewhere, ...here.flatMap((note) => bodyOf(note, series.structure, this.scale()) ?? [])];
  }

  figuresOf(series: SeriesView) {
    return seriesFigures(series.structure, this.bodiesOf(series), this.image()?.find?.fruitBodies ?? 1);
  }

  /** The structure that a measure is of; null for anything else. */
  structureOf(note: Pick<Note, 'seriesId'>): string | null {
    return this.series().find(({ id }) => id === note.seriesId)?.structure ?? null;
  }

  /** The own series of this structure, if there is one. */
  ownSeries(structure: string): SeriesView | null {
    const own = this.me()?.id;
    return this.series().find((series) => series.structure === structure && series.observer.id === own) ?? null;
  }

  /** Opens the own series of a structure, with the choices of last time. What goes wrong stands in `trouble`. */
  openSeries(structure: string): Observable<SeriesView> {
    const imageId = this.imageId() as string;
    this.trouble.set(null);
    const body = { structure, ...this.lastTime.of(structure) };
    return this.api.call(seriesRoutes.open, { params: { imageId }, body }).pipe(
      tap((series) => this.seriesKept.update((all) => [...all.filter(({ id }) => id !== series.id), series])),
      catchError((error: unknown) => {
        this.trouble.set(toApiProblem(error));
        return EMPTY;
      }),
    );
  }

  editSeries(series: SeriesView, change: EditSeries): void {
    this.trouble.set(null);
    this.lastTime.remember(series.structure, {
      edgeRule: series.edgeRule,
      ornamentIncluded: series.ornamentIncluded,
      ...change,
    });
    this.api.call(seriesRoutes.edit, { params: { seriesId: series.id }, body: change }).subscribe({
      next: (edited) => this.seriesKept.update((all) => all.map((one) => (one.id === edited.id ? edited : one))),
      error: (error: unknown) => this.trouble.set(toApiProblem(error)),
    });
  }

  /** Errors are the caller's: the panel that sets a scale says them where it was set. */
  setScale(body: SetScale): Observable<ImageView> {
    const imageId = this.imageId() as string;
    return this.api.call(imageRoutes.setScale, { params: { imageId }, body }).pipe(
      tap((image) => {
        this.imageAsked.set(image);
        this.askSeries().subscribe();
      }),
    );
  }

  private askSeries(): Observable<unknown> {
    const imageId = this.imageId();
    if (imageId === undefined) return EMPTY;
    return this.api.call(seriesRoutes.ofImage, { params: { imageId } }).pipe(
      filter(() => imageId === this.imageId()),
      tap((series) => this.seriesKept.set(series)),
      catchError(() => EMPTY), // the picture's own request says what is wrong; a later edit asks again
      finalize(() => this.seriesLoaded.set(true)),
    );
  }

  private countOf(structure: string): number {
    const own = this.mayMeasure() ? this.me()?.id : undefined;
    return this.series()
      .filter((series) => series.structure === structure && (own === undefined || series.observer.id === own))
      .reduce((total, series) => total + this.bodiesOf(series).length, 0);
  }

  private fullest(): string | null {
    return [...this.series()].sort((a, b) => this.bodiesOf(b).length - this.bodiesOf(a).length)[0]?.structure ?? null;
  }
}
