import * as z from 'zod/mini';
import { NOTE_KINDS } from '../annotations/note.js';
import { Id, ImagePoint, PersonRef } from './common.js';
import { defineRoutes } from './route.js';

const Segment = z.strictObject({ a: ImagePoint, b: ImagePoint });

/** See `shared/annotations/note.ts` for what each means. */
export const NoteGeometry = z.discriminatedUnion('type', [
  z.strictObject({ type: z.literal('line'), a: ImagePoint, b: ImagePoint }),
  z.strictObject({ type: z.literal('cross'), along: Segment, across: z.nullable(Segment) }),
  z.strictObject({ type: z.literal('path'), points: z.array(ImagePoint).check(z.minLength(2), z.maxLength(2000)) }),
  z.strictObject({ type: z.literal('pointer'), at: ImagePoint, label: ImagePoint }),
  z.strictObject({ type: z.literal('outline'), points: z.array(ImagePoint).check(z.minLength(3), z.maxLength(2000)) }),
]);

export const Note = z.strictObject({
  id: Id,
  imageId: Id,
  layer: Id,
  kind: z.enum(NOTE_KINDS),
  seriesId: z.nullable(Id),
  geometry: NoteGeometry,
  text: z.string().check(z.maxLength(2000)),
});

export const NoteEdit = z.strictObject({ id: Id, noteId: Id, before: z.nullable(Note), after: z.nullable(Note) });

/** An edit as the server kept it, numbered. */
export const KeptEdit = z.strictObject({ seq: z.number(), author: PersonRef, edit: NoteEdit });
export type KeptEdit = z.infer<typeof KeptEdit>;

/** All notes of a picture, and the number of the last edit that they contain. */
export const NotesView = z.strictObject({ seq: z.number(), notes: z.array(Note), layers: z.array(PersonRef) });
export type NotesView = z.infer<typeof NotesView>;

export const NotesSince = z.strictObject({ after: z.coerce.number().check(z.int(), z.minimum(0)) });
export const EditsView = z.strictObject({ seq: z.number(), edits: z.array(KeptEdit) });
export type EditsView = z.infer<typeof EditsView>;

export const PushEdits = z.strictObject({ edits: z.array(NoteEdit).check(z.minLength(1), z.maxLength(200)) });
export type PushEdits = z.infer<typeof PushEdits>;

/**
 * `applied`; `repeated` (this id was kept before); `superseded` (somebody changed the note meanwhile: this
 * later edit won, theirs stays in the history); `dropped` (the note had been removed meanwhile).
 */
export const EditOutcome = z.strictObject({
  id: Id,
  outcome: z.enum(['applied', 'repeated', 'superseded', 'dropped']),
});
export const PushedEdits = z.strictObject({ seq: z.number(), outcomes: z.array(EditOutcome) });
export type PushedEdits = z.infer<typeof PushedEdits>;

const image = { on: 'image', param: 'imageId' } as const;
export const noteRoutes = defineRoutes({
  read: { method: 'get', path: '/api/images/:imageId/notes', ...image, action: 'image.read', response: NotesView },
  since: {
    method: 'get',
    path: '/api/images/:imageId/note-edits',
    ...image,
    action: 'image.read',
    query: NotesSince,
    response: EditsView,
  },
  push: {
    method: 'post',
    path: '/api/images/:imageId/note-edits',
    ...image,
    action: 'image.annotate',
    body: PushEdits,
    response: PushedEdits,
  },
});
