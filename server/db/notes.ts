import type { Knex } from 'knex';
import type { EditOutcome } from '../../shared/annotations/document.js';
import type { Note, NoteEdit } from '../../shared/annotations/note.js';
import type { PersonRef } from '../../shared/contracts/common.js';
import type { KeptEdit } from '../../shared/contracts/notes.js';
import type { Database } from './database.js';

/** a note as the contract has it, with arrays that may be written to */
type KeptNote = NonNullable<KeptEdit['edit']['after']>;

interface NoteRow {
  id: string;
  image_id: string;
  layer: string;
  kind: Note['kind'];
  series_id: string | null;
  geometry: string;
  text: string;
  last_seq: number;
}

interface EditRow {
  seq: number;
  id: string;
  image_id: string;
  note_id: string;
  author_id: string;
  author_name: string;
  before: string | null;
  after: string | null;
  outcome: EditOutcome;
}

/** An edit with what became of it. */
export interface RecordedEdit extends KeptEdit {
  readonly outcome: EditOutcome;
}

/** Notes as they are now, and the append-only edits that made them so. */
export class NoteTable {
  constructor(private readonly db: Database) {}

  /** Notes and the number of the last edit in them are of one moment. */
  async ofImage(imageId: string): Promise<{ seq: number; notes: KeptNote[]; layers: PersonRef[] }> {
    return this.db.read.transaction(async (trx) => {
      const notes = await this.current(imageId, trx);
      const layers = (await trx('users')
        .whereIn('id', [...new Set(notes.map((note) => note.layer))])
        .orderBy('name')
        .select('id', 'name')) as PersonRef[];
      return { seq: await this.lastSeq(imageId, trx), notes, layers };
    });
  }

  /** edits after a number, in the server's order; `seq` is the last one's */
  async editsAfter(imageId: string, after: number): Promise<{ seq: number; edits: RecordedEdit[] }> {
    const rows = (await this.db
      .read('note_edits')
      .join('users', 'users.id', 'note_edits.author_id')
      .where('note_edits.image_id', imageId)
      .where('note_edits.seq', '>', after)
      .orderBy('note_edits.seq')
      .select('note_edits.*', { author_name: 'users.name' })) as EditRow[];
    return { seq: rows.at(-1)?.seq ?? after, edits: rows.map(toRecordedEdit) };
  }

  async current(imageId: string, trx: Knex.Transaction): Promise<KeptNote[]> {
    const rows = (await trx('notes').where({ image_id: imageId }).orderBy('id')) as NoteRow[];
    return rows.map(toNote);
  }

  async lastSeq(imageId: string, trx: Knex.Transaction): Promise<number> {
    const row = (await trx('note_edits').where({ image_id: imageId }).max({ seq: 'seq' }).first()) as
      { seq: number | null } | undefined;
    return row?.seq ?? 0;
  }

  /** who kept an edit of this id, and on which picture; null when nobody did */
  async keptBy(editId: string, trx: Knex.Transaction): Promise<{ authorId: string; imageId: string } | null> {
    const row = (await trx('note_edits').where({ id: editId }).first('author_id', 'image_id')) as
      { author_id: string; image_id: string } | undefined;
    return row ? { authorId: row.author_id, imageId: row.image_id } : null;
  }

  /** the picture that a note of this id lies on, or lay on; null for a new id */
  async imageOfNote(noteId: string, trx: Knex.Transaction): Promise<string | null> {
    const row = (await trx('note_edits').where({ note_id: noteId }).first('image_id')) as
      { image_id: string } | undefined;
    return row?.image_id ?? null;
  }

  /** @returns its number */
  async append(
    edit: NoteEdit & { imageId: string; authorId: string; outcome: EditOutcome; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<number> {
    const [row] = (await trx('note_edits')
      .insert({
        id: edit.id,
        image_id: edit.imageId,
        note_id: edit.noteId,
        author_id: edit.authorId,
        before: edit.before && JSON.stringify(edit.before),
        after: edit.after && JSON.stringify(edit.after),
        outcome: edit.outcome,
        created_at: edit.createdAt,
      })
      .returning('seq')) as { seq: number }[];
    if (!row) throw new Error('An edit was kept without a number.');
    return row.seq;
  }

  async put(note: Note, seq: number, trx: Knex.Transaction): Promise<void> {
    const row: NoteRow = {
      id: note.id,
      image_id: note.imageId,
      layer: note.layer,
      kind: note.kind,
      series_id: note.seriesId,
      geometry: JSON.stringify(note.geometry),
      text: note.text,
      last_seq: seq,
    };
    await trx('notes').insert(row).onConflict('id').merge();
  }

  async remove(noteId: string, trx: Knex.Transaction): Promise<void> {
    await trx('notes').where({ id: noteId }).delete();
  }

  /** upright size of a picture; null until intake has read it */
  async sizeOfImage(imageId: string, trx: Knex.Transaction): Promise<{ width: number; height: number } | null> {
    const row = (await trx('images').where({ id: imageId }).first('width', 'height')) as
      { width: number | null; height: number | null } | undefined;
    return row?.width && row.height ? { width: row.width, height: row.height } : null;
  }
}

function toNote(row: NoteRow): KeptNote {
  return {
    id: row.id,
    imageId: row.image_id,
    layer: row.layer,
    kind: row.kind,
    seriesId: row.series_id,
    geometry: JSON.parse(row.geometry) as KeptNote['geometry'],
    text: row.text,
  };
}

function toRecordedEdit(row: EditRow): RecordedEdit {
  return {
    outcome: row.outcome,
    seq: row.seq,
    author: { id: row.author_id, name: row.author_name },
    edit: {
      id: row.id,
      noteId: row.note_id,
      before: row.before === null ? null : (JSON.parse(row.before) as KeptNote),
      after: row.after === null ? null : (JSON.parse(row.after) as KeptNote),
    },
  };
}
