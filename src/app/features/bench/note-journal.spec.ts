import type { Note, NoteEdit } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import { NO_HISTORY, redo, remember, undo } from './history';
import { acknowledge, documentOf, letGo, receive, write, type Journal } from './note-journal';

const note = (id: string, text: string): Note => ({
  id,
  imageId: 'image',
  layer: 'me',
  kind: 'point',
  seriesId: null,
  geometry: { type: 'pointer', at: px(10, 20), label: px(30, 5) },
  text,
});
const made = (id: string, text: string, edit = `make-${id}`): NoteEdit => ({
  id: edit,
  noteId: id,
  before: null,
  after: note(id, text),
});
const worded = (id: string, from: string, to: string, edit: string): NoteEdit => ({
  id: edit,
  noteId: id,
  before: note(id, from),
  after: note(id, to),
});
const removed = (id: string, text: string, edit: string): NoteEdit => ({
  id: edit,
  noteId: id,
  before: note(id, text),
  after: null,
});
const EMPTY: Journal = { base: new Map(), seq: 0, sent: [], unsent: [] };
const texts = (journal: Journal) => [...documentOf(journal).values()].map(({ text }) => text).sort();

describe('the journal of a picture', () => {
  it('shows an edit at once, and through every stage of being kept', () => {
    const edit = made('a', 'warts');
    const drawn = write(EMPTY, edit);
    const sent = acknowledge(drawn, new Set([edit.id]), 7);
    const read = receive(sent, { seq: 7, edits: [edit] });
    for (const journal of [drawn, sent, read]) expect(texts(journal)).toEqual(['warts']);
    expect([drawn.unsent.length, sent.unsent.length, sent.sent.length, read.sent.length]).toEqual([1, 0, 1, 0]);
    expect(read.base.get('a')).toEqual(edit.after);
  });

  it('lays unsent edits on top of what others did, so that their undo takes back one’s own alone', () => {
    const base = receive(EMPTY, { seq: 1, edits: [made('a', 'first')] });
    const mine = write(base, worded('a', 'first', 'mine', 'w1'));
    const merged = receive(mine, { seq: 2, edits: [worded('a', 'first', 'theirs', 'w2')] });
    expect(texts(merged)).toEqual(['mine']);
    expect(merged.unsent[0]?.before?.text).toBe('theirs');
  });

  it('drops a change of a note that somebody removed', () => {
    const base = receive(EMPTY, { seq: 1, edits: [made('a', 'first'), made('b', 'other')] });
    const mine = write(write(base, worded('a', 'first', 'mine', 'w1')), worded('b', 'other', 'kept', 'w2'));
    const merged = receive(mine, { seq: 2, edits: [removed('a', 'first', 'r1')] });
    expect(texts(merged)).toEqual(['kept']);
    expect(merged.unsent.map(({ id }) => id)).toEqual(['w2']);
  });

  it('keeps what was drawn while a push was under way', () => {
    const two = write(write(EMPTY, made('a', 'one')), made('b', 'two'));
    const journal = receive(acknowledge(two, new Set(['make-a']), 1), { seq: 1, edits: [made('a', 'one')] });
    expect(texts(journal)).toEqual(['one', 'two']);
    expect(journal.unsent.map(({ id }) => id)).toEqual(['make-b']);
  });

  it('is not thrown back by an answer that was overtaken', () => {
    const ahead = receive(EMPTY, { seq: 5, edits: [made('a', 'one')] });
    expect(receive(ahead, { seq: 3, edits: [] })).toBe(ahead);
  });

  it('does not do an edit twice whose acknowledgement was lost', () => {
    const drawn = write(EMPTY, made('a', 'one'));
    const read = receive(drawn, { seq: 1, edits: [made('a', 'one')] });
    expect(read.unsent).toEqual([]);
    expect(texts(read)).toEqual(['one']);
  });
});

describe('letting go of what the server refuses', () => {
  const journal = [
    made('a', 'first'),
    made('b', 'second'),
    worded('a', 'first', 'more', 'w1'),
    made('c', 'third'),
  ].reduce(write, EMPTY);

  it('takes the edit that was named and what was built on it, and keeps the rest', () => {
    const let1 = letGo(journal, ['#/edits/0/after/geometry']);
    expect(texts(let1.journal)).toEqual(['second', 'third']);
    expect(let1.gone).toEqual(['make-a', 'w1']);
    expect(texts(letGo(journal, ['#/edits/2', '#/edits/3']).journal)).toEqual(['first', 'second']);
  });

  it('takes the oldest where none was named', () => {
    expect(letGo(journal, []).gone).toEqual(['make-a', 'w1']);
    expect(letGo(EMPTY, []).gone).toEqual([]);
  });
});

describe('undo and redo', () => {
  it('take one gesture back and bring it again, as often as one likes', () => {
    let doc = new Map([['a', note('a', 'warts')]]) as ReadonlyMap<string, Note>;
    let history = remember(NO_HISTORY, made('a', 'warts'));
    for (let turn = 0; turn < 3; turn++) {
      const back = undo(history, doc, `undo-${turn}`);
      expect(back.edit).toMatchObject({ before: { text: 'warts' }, after: null });
      doc = new Map();
      const again = redo(back.history, doc, `redo-${turn}`);
      expect(again.edit).toMatchObject({ before: null, after: { text: 'warts' } });
      doc = new Map([['a', note('a', 'warts')]]);
      history = again.history;
    }
    expect(history.done).toHaveLength(1);
    expect(history.undone).toHaveLength(0);
  });

  it('passes over notes that somebody else removed', () => {
    const history = [made('a', 'one'), made('b', 'two')].reduce(remember, NO_HISTORY);
    const { edit } = undo(history, new Map([['a', note('a', 'one')]]), 'u');
    expect(edit?.noteId).toBe('a');
  });

  it('has nothing to redo after a new edit', () => {
    const back = undo(remember(NO_HISTORY, made('a', 'one')), new Map([['a', note('a', 'one')]]), 'u');
    expect(remember(back.history, made('b', 'two')).undone).toEqual([]);
  });
});
