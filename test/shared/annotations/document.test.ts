import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { NoteDocument } from '../../../shared/annotations/document.js';
import {
  applyEdit,
  applyEdits,
  EMPTY_DOCUMENT,
  inverse,
  rebase,
  sameNote,
} from '../../../shared/annotations/document.js';
import type { Note, NoteEdit } from '../../../shared/annotations/note.js';
import { px } from '../../../shared/geometry/points.js';
import { codeOf } from '../../support/close.js';

function note(id: string, text: string, x = 10): Note {
  return {
    id,
    imageId: 'image',
    layer: 'ada',
    kind: 'point',
    seriesId: null,
    text,
    geometry: { type: 'pointer', at: px(x, 20), label: px(x + 50, 60) },
  };
}

let made = 0;
const edit = (noteId: string, before: Note | null, after: Note | null): NoteEdit => ({
  id: `edit-${made++}`,
  noteId,
  before,
  after,
});
const docOf = (...notes: Note[]): NoteDocument => new Map(notes.map((one) => [one.id, one]));
const entries = (doc: NoteDocument) => Object.fromEntries([...doc].sort(([a], [b]) => a.localeCompare(b)));

describe('one edit', () => {
  it('makes, changes and removes a note, and leaves the given document as it was', () => {
    const first = note('a', 'peridium');
    const second = note('a', 'peridium, torn');
    const madeIt = applyEdit(EMPTY_DOCUMENT, edit('a', null, first));
    expect(madeIt).toEqual({ doc: docOf(first), outcome: 'applied' });
    const changed = applyEdit(madeIt.doc, edit('a', first, second));
    expect(changed).toEqual({ doc: docOf(second), outcome: 'applied' });
    expect(applyEdit(changed.doc, edit('a', second, null))).toEqual({ doc: EMPTY_DOCUMENT, outcome: 'applied' });
    expect(madeIt.doc.get('a')).toBe(first);
    expect(EMPTY_DOCUMENT.size).toBe(0);
  });

  it('changes nothing when it comes twice', () => {
    const change = edit('a', note('a', 'one'), note('a', 'two'));
    const once = applyEdit(docOf(note('a', 'one')), change);
    expect(applyEdit(once.doc, change)).toEqual({ doc: once.doc, outcome: 'applied' });
    const removal = edit('a', note('a', 'two'), null);
    const gone = applyEdit(once.doc, removal);
    expect(applyEdit(gone.doc, removal)).toEqual({ doc: EMPTY_DOCUMENT, outcome: 'applied' });
  });

  it('refuses to say nothing, or to speak of another note', () => {
    expect(codeOf(() => applyEdit(EMPTY_DOCUMENT, edit('a', null, null)))).toBe('empty-edit');
    expect(codeOf(() => applyEdit(EMPTY_DOCUMENT, edit('a', null, note('b', ''))))).toBe('edit-of-another-note');
  });
});

describe('two writers on one note', () => {
  const seen = note('a', 'capillitium');
  const mine = edit('a', seen, note('a', 'capillitium, spiral bands'));
  const theirs = edit('a', seen, note('a', 'elater'));

  it('let the last one win, and say so', () => {
    const first = applyEdit(docOf(seen), theirs);
    const last = applyEdit(first.doc, mine);
    expect(last.outcome).toBe('superseded');
    expect(last.doc.get('a')?.text).toBe('capillitium, spiral bands');
  });

  it('do not bring a removed note back by changing it', () => {
    const removed = applyEdit(docOf(seen), edit('a', seen, null));
    expect(applyEdit(removed.doc, mine)).toEqual({ doc: EMPTY_DOCUMENT, outcome: 'dropped' });
    expect(rebase(mine, removed.doc)).toBeNull();
  });

  it('bring it back by undoing the removal', () => {
    const removal = edit('a', seen, null);
    const removed = applyEdit(docOf(seen), removal);
    expect(applyEdit(removed.doc, inverse(removal, 'undo'))).toEqual({ doc: docOf(seen), outcome: 'applied' });
  });

  it('can remove what the other changed', () => {
    const changed = applyEdit(docOf(seen), theirs);
    expect(applyEdit(changed.doc, edit('a', seen, null))).toEqual({ doc: EMPTY_DOCUMENT, outcome: 'superseded' });
  });

  it('take back only their own change after rebasing', () => {
    const changed = applyEdit(docOf(seen), theirs);
    const onTop = rebase(mine, changed.doc) as NoteEdit;
    expect(onTop.before?.text).toBe('elater');
    const both = applyEdit(changed.doc, onTop);
    expect(both.outcome).toBe('applied');
    expect(applyEdit(both.doc, inverse(onTop, 'undo')).doc.get('a')?.text).toBe('elater');
  });
});

describe('sameness of notes', () => {
  it('goes by what they hold, not by the order or the absence of fields', () => {
    const one = note('a', 'x');
    const other = {
      ...one,
      geometry: { label: px(60, 60), at: { y: 20, x: 10, space: undefined }, type: 'pointer' },
    } as Note;
    expect(sameNote(one, other)).toBe(true);
    expect(sameNote(one, note('a', 'x', 11))).toBe(false);
    expect(sameNote(one, null)).toBe(false);
    const line: Note = { ...one, geometry: { type: 'path', points: [px(1, 1), px(2, 2)] } };
    expect(sameNote(line, { ...one, geometry: { type: 'path', points: [px(1, 1), px(2, 2), px(3, 3)] } })).toBe(false);
  });
});

describe('any edits', () => {
  const state = (id: string) => fc.option(fc.tuple(fc.string(), fc.integer()).map(([text, x]) => note(id, text, x)));

  /** Edits of one writer who always saw the current state, on notes of these names. */
  const history = (names: readonly string[]) =>
    fc.array(fc.constantFrom(...names).chain((id) => fc.tuple(fc.constant(id), state(id)))).map((wishes) => {
      const edits: NoteEdit[] = [];
      let doc = EMPTY_DOCUMENT;
      for (const [id, after] of wishes) {
        const before = doc.get(id) ?? null;
        if (before === null && after === null) continue;
        const next = edit(id, before, after);
        edits.push(next);
        doc = applyEdit(doc, next).doc;
      }
      return edits;
    });

  it('are undone, last first, to the very beginning', () => {
    fc.assert(
      fc.property(history(['a', 'b', 'c']), (edits) => {
        let doc = EMPTY_DOCUMENT;
        for (const one of edits) {
          const after = applyEdit(doc, one);
          expect(after.outcome).toBe('applied');
          expect(entries(applyEdit(after.doc, inverse(one, 'undo')).doc)).toEqual(entries(doc));
          doc = after.doc;
        }
        const undone = applyEdits(
          doc,
          [...edits].reverse().map((one) => inverse(one, `undo ${one.id}`)),
        );
        expect(undone.size).toBe(0);
      }),
    );
  });

  it('of two writers on different notes merge to the same, whoever comes first and however they mix', () => {
    fc.assert(
      fc.property(history(['a', 'b']), history(['c', 'd']), fc.array(fc.boolean()), (ada, ben, turns) => {
        const mixed: NoteEdit[] = [];
        const [left, right] = [[...ada], [...ben]];
        for (const adaFirst of turns) mixed.push(...(adaFirst ? left : right).splice(0, 1));
        mixed.push(...left, ...right);
        const expected = entries(applyEdits(EMPTY_DOCUMENT, [...ada, ...ben]));
        expect(entries(applyEdits(EMPTY_DOCUMENT, [...ben, ...ada]))).toEqual(expected);
        expect(entries(applyEdits(EMPTY_DOCUMENT, mixed))).toEqual(expected);
      }),
    );
  });

  it('of two writers on the same notes leave every reader of the same order with the same', () => {
    fc.assert(
      fc.property(history(['a', 'b']), history(['a', 'b']), (ada, ben) => {
        const order = [...ada, ...ben];
        // once in one go, once through a copy that went over the wire
        const wire = JSON.parse(JSON.stringify(order)) as NoteEdit[];
        expect(entries(applyEdits(EMPTY_DOCUMENT, wire))).toEqual(entries(applyEdits(EMPTY_DOCUMENT, order)));
      }),
    );
  });
});
