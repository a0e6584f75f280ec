import { applyEdit, inverse, rebase, type NoteDocument } from '@shared/annotations/document';
import type { NoteEdit } from '@shared/annotations/note';

/** The own edits that can be taken back, and those that were, newest last. */
export interface History {
  readonly done: readonly NoteEdit[];
  readonly undone: readonly NoteEdit[];
}

export const NO_HISTORY: History = { done: [], undone: [] };

export interface HistoryStep {
  readonly history: History;
  /** the edit that does it; null when nothing was left, or only notes that others removed */
  readonly edit: NoteEdit | null;
}

export function remember(history: History, edit: NoteEdit): History {
  return { done: [...history.done, edit], undone: [] };
}

/** Takes the newest own edit back, on top of what others did meanwhile. */
export function undo({ done, undone }: History, doc: NoteDocument, newId: string): HistoryStep {
  const [edit, rest] = takeBack(done, doc, newId);
  return { edit, history: { done: rest, undone: edit ? [...undone, edit] : undone } };
}

/** Does the newest taken-back edit again. */
export function redo({ done, undone }: History, doc: NoteDocument, newId: string): HistoryStep {
  const [edit, rest] = takeBack(undone, doc, newId);
  return { edit, history: { done: edit ? [...done, edit] : done, undone: rest } };
}

function takeBack(
  edits: readonly NoteEdit[],
  doc: NoteDocument,
  newId: string,
): [NoteEdit | null, readonly NoteEdit[]] {
  for (let i = edits.length - 1; i >= 0; i--) {
    const edit = rebase(inverse(edits[i] as NoteEdit, newId), doc);
    // one that would change nothing (somebody else removed the note already) is passed over
    if (edit && applyEdit(doc, edit).doc !== doc) return [edit, edits.slice(0, i)];
  }
  return [null, []];
}
