import { computed, DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import {
  catchError,
  defer,
  EMPTY,
  exhaustMap,
  expand,
  filter,
  fromEvent,
  merge,
  of,
  Subject,
  switchMap,
  tap,
  timer,
  type Observable,
} from 'rxjs';
import { v7 as newId } from 'uuid';
import { EMPTY_DOCUMENT } from '@shared/annotations/document';
import type { Note, NoteEdit, NoteGeometry, NoteKind } from '@shared/annotations/note';
import type { PersonRef } from '@shared/contracts/common';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { SessionStore } from '../../core/session-store';
import { NO_HISTORY, redo, remember, undo } from './history';
import { BATCH, NoteExchange } from './note-exchange';
import { acknowledge, documentOf, letGo, receive, write, type Journal } from './note-journal';
import { UnsentEdits } from './unsent-edits';

/** How often others' edits are asked for while the page is seen, ms. */
const LOOK_EVERY = 4000;
/** Waits after a failure, ms: doubled each time, up to the last. */
const WAIT = { first: 1000, longest: 30_000 } as const;

/**
 * - `kept`: the server has everything
 * - `keeping`: on its way
 * - `offline`: no answer; it is tried again by itself
 * - `refused`: the server won't have it: `problem` says why
 */
export type KeptState = 'kept' | 'keeping' | 'offline' | 'refused';

/**
 * The notes of one picture: shown at once, sent at once, merged with what others do. Own edits lie in the
 * browser's storage until the server has acknowledged them. Provided by the bench, one per picture.
 */
@Injectable()
export class NoteStore {
  private readonly network = inject(NoteExchange);
  private readonly session = inject(SessionStore);
  private readonly storage = inject(UnsentEdits);
  private readonly document = inject(DOCUMENT);
  private readonly destroyed = inject(DestroyRef);

  private readonly journal = signal<Journal>({ base: EMPTY_DOCUMENT, seq: 0, sent: [], unsent: [] });
  private readonly history = signal(NO_HISTORY);
  private readonly image = signal<string | null>(null);
  private readonly isLoaded = signal(false);
  private readonly trouble = signal<ApiProblem | null>(null);
  private readonly people = signal<readonly PersonRef[]>([]);
  private readonly chosen = signal<string | null>(null);
  private readonly nudge = new Subject<void>();
  private readonly acknowledgements = new Subject<void>();
  private failures = 0;
  /** raised with every picture: answers to an earlier one are not heard */
  private opening = 0;

  readonly doc = computed(() => documentOf(this.journal()));
  /** oldest first, since ids sort by time */
  readonly notes = computed(() => [...this.doc().values()].sort((a, b) => (a.id < b.id ? -1 : 1)));
  readonly loaded = this.isLoaded.asReadonly();
  readonly problem = this.trouble.asReadonly();
  readonly selected = computed(() =>
    this.chosen() === null ? null : (this.doc().get(this.chosen() as string) ?? null),
  );
  readonly canUndo = computed(() => this.history().done.length > 0);
  readonly canRedo = computed(() => this.history().undone.length > 0);
  readonly unsent = computed(() => this.journal().unsent.length);
  readonly kept = computed<KeptState>(() => {
    if (this.unsent() === 0) return 'kept';
    const trouble = this.trouble();
    if (!trouble) return 'keeping';
    return passes(trouble) ? 'offline' : 'refused';
  });
  /** The server has taken edits: what it computes from them (series) can be asked anew. */
  readonly taken: Observable<void> = this.acknowledgements.asObservable();

  constructor() {
    const window = this.document.defaultView as Window;
    const seen = () => this.document.visibilityState === 'visible';
    merge(
      this.nudge,
      timer(LOOK_EVERY, LOOK_EVERY).pipe(filter(() => seen() && this.person !== null && this.trouble() === null)),
      fromEvent(window, 'online'),
      fromEvent(this.document, 'visibilitychange').pipe(filter(seen)),
    )
      .pipe(
        filter(() => this.isLoaded()),
        exhaustMap(() => this.exchangeAll()),
        takeUntilDestroyed(),
      )
      .subscribe();
    fromEvent<BeforeUnloadEvent>(window, 'beforeunload')
      .pipe(
        filter(() => this.unsent() > 0),
        takeUntilDestroyed(),
      )
      .subscribe((event) => event.preventDefault());
  }

  /** Loads a picture's notes, with what this person has not sent yet on top. */
  open(imageId: string): void {
    const opening = ++this.opening;
    this.image.set(imageId);
    this.isLoaded.set(false);
    this.history.set(NO_HISTORY);
    this.chosen.set(null);
    this.trouble.set(null);
    this.journal.set({ base: EMPTY_DOCUMENT, seq: 0, sent: [], unsent: [] });
    this.network
      .read(imageId)
      .pipe(
        filter(() => opening === this.opening),
        takeUntilDestroyed(this.destroyed),
      )
      .subscribe({
        next: ({ seq, notes, layers }) => {
          const unsent = this.person ? this.storage.of(this.person, imageId) : [];
          this.people.set(layers);
          this.journal.set({ base: new Map(notes.map((note) => [note.id, note])), seq, sent: [], unsent });
          this.isLoaded.set(true);
          if (unsent.length > 0) this.nudge.next();
          if (this.person) this.network.sendForgotten(this.person, imageId);
        },
        error: (error: unknown) => this.trouble.set(toApiProblem(error)),
      });
  }

  /** @returns the new note's id */
  add(note: Omit<Note, 'id' | 'imageId' | 'layer'>, id: string = newId()): string {
    const [imageId, layer] = [this.image(), this.person];
    if (imageId === null || layer === null) return id;
    this.apply({ id: newId(), noteId: id, before: null, after: { ...note, id, imageId, layer } });
    this.chosen.set(id);
    return id;
  }

  reshape(noteId: string, geometry: NoteGeometry): void {
    this.change(noteId, (note) => ({ ...note, geometry }));
  }

  word(noteId: string, text: string): void {
    this.change(noteId, (note) => ({ ...note, text }));
  }

  remove(noteId: string): void {
    const note = this.doc().get(noteId);
    if (note) this.apply({ id: newId(), noteId, before: note, after: null });
  }

  undo(): Note | null {
    return this.step(undo);
  }

  redo(): Note | null {
    return this.step(redo);
  }

  select(noteId: string | null): void {
    this.chosen.set(noteId);
  }

  /** Tries again what failed. */
  retry(): void {
    this.trouble.set(null);
    this.nudge.next();
  }

  /** Lets go of what the server will never have, so that the rest can go out. */
  letGo(): void {
    const pointers = this.trouble()?.fields.map(({ pointer }) => pointer) ?? [];
    const { journal, gone } = letGo(this.journal(), pointers);
    gone.forEach((id) => this.forget(id));
    this.journal.set(journal);
    this.retry();
  }

  /** The name of the person in whose layer a note lies; null for one not known here. */
  authorOf(note: Pick<Note, 'layer'>): string | null {
    const me = this.session.user();
    return me?.id === note.layer ? me.name : (this.people().find(({ id }) => id === note.layer)?.name ?? null);
  }

  countOf(kind: NoteKind): number {
    return this.notes().filter((note) => note.kind === kind).length;
  }

  private get person(): string | null {
    return this.session.user()?.id ?? null;
  }

  private change(noteId: string, to: (note: Note) => Note): void {
    const note = this.doc().get(noteId);
    if (note) this.apply({ id: newId(), noteId, before: note, after: to(note) });
  }

  private apply(edit: NoteEdit): void {
    this.history.update((history) => remember(history, edit));
    this.send(edit);
  }

  private step(how: typeof undo): Note | null {
    const { history, edit } = how(this.history(), this.doc(), newId());
    this.history.set(history);
    if (edit) this.send(edit);
    if (edit) this.chosen.set(edit.after?.id ?? null);
    return edit?.after ?? null;
  }

  private send(edit: NoteEdit): void {
    const [person, image] = [this.person, this.image()];
    if (person === null || image === null) return;
    this.storage.keep(person, image, edit);
    this.journal.update((journal) => write(journal, edit));
    this.nudge.next();
  }

  private forget(editId: string): void {
    const [person, image] = [this.person, this.image()];
    if (person !== null && image !== null) this.storage.forget(person, image, editId);
  }

  /** Sends and reads until nothing is left; one exchange at a time keeps the order. */
  private exchangeAll(): Observable<unknown> {
    const opening = this.opening;
    return this.exchange(opening).pipe(
      expand(() => (this.unsent() > 0 && opening === this.opening ? this.exchange(opening) : EMPTY)),
      catchError((error: unknown) => {
        if (opening === this.opening) this.failed(toApiProblem(error));
        return EMPTY;
      }),
    );
  }

  private exchange(opening: number): Observable<unknown> {
    return defer(() => {
      const imageId = this.image() as string;
      const edits = this.journal().unsent.slice(0, BATCH);
      const pushed: Observable<number | null> = edits.length === 0 ? of(null) : this.network.push(imageId, edits);
      return pushed.pipe(
        filter(() => opening === this.opening),
        tap((seq) => {
          if (seq !== null) this.acknowledged(edits, seq);
        }),
        switchMap(() => this.network.since(imageId, this.journal().seq)),
        filter(() => opening === this.opening),
        tap((answer) => {
          this.journal.update((journal) => receive(journal, answer));
          this.people.update((people) => withAuthors(people, answer.authors));
          this.failures = 0;
          this.trouble.set(null);
        }),
      );
    });
  }

  private acknowledged(edits: readonly NoteEdit[], seq: number): void {
    this.journal.update((journal) => acknowledge(journal, new Set(edits.map(({ id }) => id)), seq));
    edits.forEach(({ id }) => this.forget(id));
    this.acknowledgements.next();
  }

  private failed(problem: ApiProblem): void {
    this.trouble.set(problem);
    if (!passes(problem)) return;
    const wait = Math.min(WAIT.longest, WAIT.first * 2 ** this.failures++);
    timer(wait)
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe(() => this.nudge.next());
  }
}

/** Whether waiting may mend it. */
function passes({ status }: ApiProblem): boolean {
  return status === 0 || status >= 500 || status === 429;
}

function withAuthors(people: readonly PersonRef[], authors: readonly PersonRef[]): readonly PersonRef[] {
  const known = new Set(people.map(({ id }) => id));
  return [...people, ...authors.filter(({ id }) => !known.has(id))];
}
