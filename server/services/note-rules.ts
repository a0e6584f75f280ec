import type { ImagePoint } from '../../shared/geometry/points.js';
import type { Note, NoteEdit, NoteGeometry } from '../../shared/annotations/note.js';
import { Forbidden, Invalid } from '../problem.js';

/** What an edit must keep to before it is merged. */
export interface NoteRules {
  readonly imageId: string;
  readonly actorId: string;
  /** upright px of the picture */
  readonly size: { readonly width: number; readonly height: number };
}

/** Shapes that each kind of note takes; which of them fits a measure is its structure's. */
const SHAPES: Record<Note['kind'], readonly NoteGeometry['type'][]> = {
  measure: ['line', 'cross', 'path'],
  point: ['pointer'],
  round: ['outline'],
};

/**
 * A person writes in their own layer alone; a note has a shape that its kind takes and lies on its picture.
 * Ends may lie outside by the picture's own size on each side: a label beside it, a body that the frame cuts.
 *
 * @param at      where the edit stands in the request, `#/edits/0`
 * @param current the note as it is now
 * @throws {Forbidden} another's layer
 * @throws {Invalid} everything else
 */
export function requireRules(edit: NoteEdit, at: string, current: Note | null, rules: NoteRules): void {
  for (const note of [current, edit.before, edit.after]) {
    if (note && note.layer !== rules.actorId) throw new Forbidden('image.annotate');
  }
  for (const [side, note] of [
    ['before', edit.before],
    ['after', edit.after],
  ] as const) {
    if (!note) continue;
    if (note.id !== edit.noteId || note.imageId !== rules.imageId) {
      throw fault(`${at}/${side}`, 'another-note', 'The note is another, or lies on another picture.');
    }
  }
  if (edit.before === null && edit.after === null) throw fault(at, 'empty-edit', 'Neither before nor after.');
  if (edit.after) requireNote(edit.after, `${at}/after`, rules);
}

function requireNote(note: Note, at: string, { size }: NoteRules): void {
  if ((note.kind === 'measure') !== (note.seriesId !== null)) {
    throw fault(`${at}/seriesId`, 'series-and-kind', 'A measure belongs to a series, and nothing else does.');
  }
  if (!SHAPES[note.kind].includes(note.geometry.type)) {
    throw fault(`${at}/geometry`, 'wrong-shape', `A ${note.geometry.type} is no ${note.kind}.`);
  }
  const inside = ({ x, y }: ImagePoint): boolean =>
    x >= -size.width && x <= 2 * size.width && y >= -size.height && y <= 2 * size.height; // false for NaN
  if (!pointsOf(note.geometry).every(inside)) {
    throw fault(`${at}/geometry`, 'outside-the-picture', `The picture has ${size.width} × ${size.height} px.`);
  }
}

function pointsOf(geometry: NoteGeometry): readonly ImagePoint[] {
  switch (geometry.type) {
    case 'line':
      return [geometry.a, geometry.b];
    case 'cross': {
      const { along, across } = geometry;
      return [along.a, along.b, ...(across ? [across.a, across.b] : [])];
    }
    case 'pointer':
      return [geometry.at, geometry.label];
    case 'path':
    case 'outline':
      return geometry.points;
  }
}

export function fault(pointer: string, code: string, detail: string): Invalid {
  return new Invalid([{ pointer, code, detail }]);
}
