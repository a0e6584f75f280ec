import { DomainError } from '../errors.js';
import type { Note, NoteEdit } from './note.js';

/** All notes of one picture, by id. */
export type NoteDocument = ReadonlyMap<string, Note>;

export const EMPTY_DOCUMENT: NoteDocument = new Map();

/**
 * What became of an edit:
 * - `applied`: nobody had changed the note meanwhile
 * - `superseded`: somebody had; this later edit won and theirs stays in the history only
 * - `dropped`: the note had been removed, and a removed note is not brought back by changing it
 */
export type EditOutcome = 'applied' | 'superseded' | 'dropped';

export interface Applied {
  readonly doc: NoteDocument;
  readonly outcome: EditOutcome;
}

/**
 * The document after one edit; the given one is left as it is.
 *
 * Two writers meet here: edits are applied in the order in which the server numbered them, and `before`
 * tells whether the writer had seen the current state. The last writer wins, note by note. Merging
 * within a note (one moves it, one words it) was rejected: a measure half one's and half the other's
 * is nobody's measurement.
 *
 * @throws {DomainError} `empty-edit`; `edit-of-another-note`
 */
export function applyEdit(doc: NoteDocument, edit: NoteEdit): Applied {
  requireSound(edit);
  const current = doc.get(edit.noteId) ?? null;
  if (sameNote(current, edit.after)) return { doc, outcome: 'applied' }; // sent twice, or both did the same
  if (current === null && edit.before !== null) return { doc, outcome: 'dropped' };
  const next = new Map(doc);
  if (edit.after === null) next.delete(edit.noteId);
  else next.set(edit.noteId, edit.after);
  return { doc: next, outcome: sameNote(current, edit.before) ? 'applied' : 'superseded' };
}

/** All edits in their order. */
export function applyEdits(doc: NoteDocument, edits: readonly NoteEdit[]): NoteDocument {
  return edits.reduce((state, edit) => applyEdit(state, edit).doc, doc);
}

/**
 * The edit that takes another back: undo is an edit like any other.
 * @param newId UUIDv7 of the new edit
 */
export function inverse(edit: NoteEdit, newId: string): NoteEdit {
  return { id: newId, noteId: edit.noteId, before: edit.after, after: edit.before };
}

/**
 * The same wish on top of what others did meanwhile: `before` becomes the current state, so that its
 * inverse takes back this edit and not theirs as well.
 *
 * @returns null when it would be dropped
 * @throws {DomainError} `empty-edit`; `edit-of-another-note`
 */
export function rebase(edit: NoteEdit, doc: NoteDocument): NoteEdit | null {
  requireSound(edit);
  const current = doc.get(edit.noteId) ?? null;
  if (current === null && edit.before !== null) return null;
  return { ...edit, before: current };
}

/** Are both the same state of a note? Absent and undefined fields count alike. */
export function sameNote(a: Note | null, b: Note | null): boolean {
  return sameData(a, b);
}

function sameData(a: unknown, b: unknown): boolean {
  if (a === b) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const [one, other] = [a as Record<string, unknown>, b as Record<string, unknown>];
  return [...new Set([...Object.keys(one), ...Object.keys(other)])].every((key) => sameData(one[key], other[key]));
}

function requireSound(edit: NoteEdit): void {
  if (edit.before === null && edit.after === null) throw new DomainError('empty-edit', 'Neither before nor after.');
  for (const side of [edit.before, edit.after]) {
    if (side !== null && side.id !== edit.noteId) {
      throw new DomainError('edit-of-another-note', `Edit of ${edit.noteId} holds ${side.id}.`);
    }
  }
}
