import type { Note, NoteEdit } from '../../../shared/annotations/note.js';
import { newId } from '../../../server/ids.js';

/** A spore measured along and across: 50 px by 40 px. */
export function sporeNote(note: Pick<Note, 'imageId' | 'layer' | 'seriesId'> & Partial<Note>): Note {
  return {
    id: newId(),
    kind: 'measure',
    geometry: {
      type: 'cross',
      along: { a: { x: 100, y: 100 }, b: { x: 130, y: 140 } },
      across: { a: { x: 90, y: 120 }, b: { x: 130, y: 120 } },
    },
    text: '',
    ...note,
  };
}

export function pointerNote(note: Pick<Note, 'imageId' | 'layer'> & Partial<Note>): Note {
  return {
    id: newId(),
    kind: 'point',
    seriesId: null,
    geometry: { type: 'pointer', at: { x: 10, y: 20 }, label: { x: 60, y: 20 } },
    text: 'hilar peg',
    ...note,
  };
}

export function making(note: Note): NoteEdit {
  return { id: newId(), noteId: note.id, before: null, after: note };
}

export function changing(before: Note, after: Note): NoteEdit {
  return { id: newId(), noteId: before.id, before, after };
}

export function removing(note: Note): NoteEdit {
  return { id: newId(), noteId: note.id, before: note, after: null };
}
