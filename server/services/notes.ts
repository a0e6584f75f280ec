import type { Knex } from 'knex';
import { applyEdit, type NoteDocument, sameNote } from '../../shared/annotations/document.js';
import type { Note, NoteEdit } from '../../shared/annotations/note.js';
import { DomainError } from '../../shared/errors.js';
import type { EditsView, NotesView, PushedEdits, PushEdits } from '../../shared/contracts/notes.js';
import type { Actor } from '../../shared/permission/can.js';
import { type Clock, instant } from '../clock.js';
import type { Database } from '../db/database.js';
import type { NoteTable } from '../db/notes.js';
import type { Series, SeriesTable } from '../db/series.js';
import { Conflict } from '../problem.js';
import type { MeasurementService } from './measurements.js';
import { outcomesFor } from './note-outcomes.js';
import { fault, type NoteRules, requireRules } from './note-rules.js';

/** What is drawn on pictures, by several writers at once. */
export class NoteService {
  constructor(
    private readonly db: Database,
    private readonly notes: NoteTable,
    private readonly series: SeriesTable,
    private readonly measurements: MeasurementService,
    private readonly clock: Clock,
  ) {}

  async read(imageId: string): Promise<NotesView> {
    return this.notes.ofImage(imageId);
  }

  /** What was done after a number: of one's own layer every edit, of others' layers what came of them. */
  async since(actor: Actor, imageId: string, after: number): Promise<EditsView> {
    const { seq, edits } = await this.notes.editsAfter(imageId, after);
    return { seq, edits: outcomesFor(actor.kind === 'user' ? actor.id : null, edits) };
  }

  /**
   * Keeps edits in the order in which they come, all or none. The rule of merging is
   * `shared/annotations/document.ts`; an edit that was kept before changes nothing, however often it is sent.
   *
   * @throws {Forbidden} a note of another's layer
   * @throws {Invalid} beside the first edit that breaks a rule, a drawing that doesn't fit its structure among them
   */
  async push(actorId: string, imageId: string, { edits }: PushEdits): Promise<PushedEdits> {
    return this.db.write.transaction(async (trx) => {
      const size = await this.notes.sizeOfImage(imageId, trx);
      if (!size) throw new Conflict('not-ready', 'The picture is still being read.');
      const rules: NoteRules = { imageId, actorId, size };
      let doc: NoteDocument = new Map((await this.notes.current(imageId, trx)).map((note) => [note.id, note]));
      const outcomes: PushedEdits['outcomes'] = [];
      for (const [i, edit] of edits.entries()) {
        const at = `#/edits/${i}`;
        if (await this.wasKept(edit.id, rules, at, trx)) {
          outcomes.push({ id: edit.id, outcome: 'repeated' });
          continue;
        }
        const step = await this.keep(edit, at, doc, rules, trx).catch((error: unknown) => {
          throw error instanceof DomainError ? fault(at, error.code, error.message) : error;
        });
        doc = step.doc;
        outcomes.push({ id: edit.id, outcome: step.outcome });
      }
      return { seq: await this.notes.lastSeq(imageId, trx), outcomes };
    });
  }

  private async keep(
    edit: NoteEdit,
    at: string,
    doc: NoteDocument,
    rules: NoteRules,
    trx: Knex.Transaction,
  ): Promise<ReturnType<typeof applyEdit>> {
    const current = doc.get(edit.noteId) ?? null;
    requireRules(edit, at, current, rules);
    if (!current && ((await this.notes.imageOfNote(edit.noteId, trx)) ?? rules.imageId) !== rules.imageId) {
      throw fault(`${at}/noteId`, 'another-note', 'A note of this id lies on another picture.');
    }
    const series = edit.after && (await this.seriesOf(edit.after, `${at}/after/seriesId`, current, rules, trx));
    const step = applyEdit(doc, edit);
    const kept = { ...edit, imageId: rules.imageId, authorId: rules.actorId, outcome: step.outcome };
    const seq = await this.notes.append({ ...kept, createdAt: instant(this.clock) }, trx);
    const next = step.doc.get(edit.noteId) ?? null;
    if (!sameNote(current, next)) await this.store(next, current, series, seq, trx);
    return step;
  }

  private async store(
    next: Note | null,
    current: Note | null,
    series: Series | null,
    seq: number,
    trx: Knex.Transaction,
  ): Promise<void> {
    if (!next) {
      if (current) await this.notes.remove(current.id, trx);
      if (current?.kind === 'measure') await this.measurements.remove(current.id, trx);
      return;
    }
    await this.notes.put(next, seq, trx);
    if (series && next.seriesId !== null) {
      if (current && sameDrawing(current, next)) return; // only its words are others
      await this.measurements.draw({ ...next, seriesId: next.seriesId }, series.structure, trx);
    } else if (current?.kind === 'measure') {
      await this.measurements.remove(next.id, trx);
    }
  }

  /**
   * The series that a measure goes into: the actor's own, of the picture's find, and of its preparation. A body
   * that is in a series already may stay there when the picture has been put under another preparation since.
   */
  private async seriesOf(
    note: Note,
    at: string,
    current: Note | null,
    rules: NoteRules,
    trx: Knex.Transaction,
  ): Promise<Series | null> {
    if (note.seriesId === null) return null;
    const series = await this.series.find(note.seriesId, trx);
    const place = await this.series.placeOfImage(rules.imageId, trx);
    if (!series || series.observer.id !== rules.actorId || series.findId !== place?.findId) {
      throw fault(at, 'no-such-series', "Takes an own series of the picture's find.");
    }
    const stays = current?.seriesId === series.id;
    if (!stays && (series.preparation?.id ?? null) !== place.preparationId) {
      throw fault(at, 'another-preparation', 'The series is of another preparation than the picture.');
    }
    return series;
  }

  private async wasKept(editId: string, rules: NoteRules, at: string, trx: Knex.Transaction): Promise<boolean> {
    const kept = await this.notes.keptBy(editId, trx);
    if (!kept) return false;
    if (kept.authorId === rules.actorId && kept.imageId === rules.imageId) return true;
    throw fault(`${at}/id`, 'id-taken', 'An edit of this id is kept elsewhere.');
  }
}

/** The same body, drawn alike in the same series. */
function sameDrawing(a: Note, b: Note): boolean {
  return sameNote({ ...a, text: '' }, { ...b, text: '' });
}
