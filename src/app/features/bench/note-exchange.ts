import { inject, Injectable } from '@angular/core';
import { catchError, EMPTY, map, of, switchMap, type Observable } from 'rxjs';
import type { Note, NoteEdit } from '@shared/annotations/note';
import type { PersonRef } from '@shared/contracts/common';
import { noteRoutes, type NotesView, type PushEdits } from '@shared/contracts/notes';
import { Api } from '../../core/api';
import { UnsentEdits } from './unsent-edits';

/** As many edits as the server takes at once. */
export const BATCH = 200;

export interface Exchanged {
  /** number that the server had reached when it had kept the pushed edits; null where none were pushed */
  readonly pushedBy: number | null;
  readonly seq: number;
  readonly edits: readonly NoteEdit[];
  readonly authors: readonly PersonRef[];
}

/** Notes over the network: what `NoteStore` asks for, without its state. */
@Injectable({ providedIn: 'root' })
export class NoteExchange {
  private readonly api = inject(Api);
  private readonly storage = inject(UnsentEdits);

  read(imageId: string): Observable<NotesView & { readonly notes: readonly Note[] }> {
    return this.api.call(noteRoutes.read, { params: { imageId } });
  }

  /** Sends edits in their order and answers the number that the server has reached by then. */
  push(imageId: string, edits: readonly NoteEdit[]): Observable<number> {
    // the contract's arrays are writable and the domain's are not; nobody writes to either
    const body: PushEdits = { edits: edits as PushEdits['edits'] };
    return this.api.call(noteRoutes.push, { params: { imageId }, body }).pipe(map(({ seq }) => seq));
  }

  /** What was done by anybody, oneself included, since an edit number. */
  since(imageId: string, after: number): Observable<Omit<Exchanged, 'pushedBy'>> {
    return this.api.call(noteRoutes.since, { params: { imageId }, query: { after } }).pipe(
      map(({ seq, edits }) => ({
        seq,
        edits: edits.map(({ edit }) => edit),
        authors: edits.map(({ author }) => author),
      })),
    );
  }

  /** What was left behind on other pictures (a lid closed on the train) goes out too. */
  sendForgotten(personId: string, openImageId: string): void {
    for (const imageId of this.storage.pictures(personId)) {
      const edits = this.storage.of(personId, imageId).slice(0, BATCH);
      if (imageId === openImageId || edits.length === 0) continue;
      this.push(imageId, edits)
        .pipe(
          switchMap(() => of(...edits)),
          catchError(() => EMPTY), // it stays where it is, and is tried again with the next picture
        )
        .subscribe((edit) => this.storage.forget(personId, imageId, edit.id));
    }
  }
}
