import { applyEdit, applyEdits, rebase, type NoteDocument } from '@shared/annotations/document';
import type { NoteEdit } from '@shared/annotations/note';

/**
 * What this browser knows of a picture's notes: the server's state up to an edit number, and the own edits
 * on top of it. Pure: `NoteStore` carries it over the network.
 */
export interface Journal {
  /** with all edits up to `seq`, own and others' */
  readonly base: NoteDocument;
  readonly seq: number;
  /** kept by the server by the time it had reached `by`, but not yet read back into `base` */
  readonly sent: readonly { readonly edit: NoteEdit; readonly by: number }[];
  /** not yet acknowledged, oldest first */
  readonly unsent: readonly NoteEdit[];
}

/** What the person sees: the server's state with the own edits on top. */
export function documentOf({ base, sent, unsent }: Journal): NoteDocument {
  return applyEdits(base, [...sent.map(({ edit }) => edit), ...unsent]);
}

export function write(journal: Journal, edit: NoteEdit): Journal {
  return { ...journal, unsent: [...journal.unsent, edit] };
}

/** The server has kept these; they stay on top until they are read back. */
export function acknowledge(journal: Journal, ids: ReadonlySet<string>, seq: number): Journal {
  const sent = journal.unsent.filter(({ id }) => ids.has(id)).map((edit) => ({ edit, by: seq }));
  return { ...journal, sent: [...journal.sent, ...sent], unsent: journal.unsent.filter(({ id }) => !ids.has(id)) };
}

/**
 * Reads edits in the server's order, own ones among them. What is still unsent goes on top of what others
 * did meanwhile; a change of a note that somebody removed is dropped.
 */
export function receive(
  journal: Journal,
  answer: { readonly seq: number; readonly edits: readonly NoteEdit[] },
): Journal {
  if (answer.seq < journal.seq) return journal; // an answer that was overtaken
  const base = applyEdits(journal.base, answer.edits);
  const read = new Set(answer.edits.map(({ id }) => id));
  const sent = journal.sent.filter(({ edit, by }) => by > answer.seq && !read.has(edit.id));
  let doc = applyEdits(
    base,
    sent.map(({ edit }) => edit),
  );
  const unsent: NoteEdit[] = [];
  for (const edit of journal.unsent) {
    const rebased = read.has(edit.id) ? null : rebase(edit, doc);
    if (!rebased) continue;
    doc = applyEdit(doc, rebased).doc;
    unsent.push(rebased);
  }
  return { base, seq: answer.seq, sent, unsent };
}

/**
 * Lets go of what the server will never have and of what was built on it, and of nothing else.
 *
 * @param pointers JSON Pointers of its refusal, `#/edits/3/after`; without one that names an edit, the oldest is meant
 */
export function letGo(journal: Journal, pointers: readonly string[]): { journal: Journal; gone: readonly string[] } {
  const named = pointers.flatMap((pointer) => /^#\/edits\/(\d+)/.exec(pointer)?.[1] ?? []).map(Number);
  const refused = new Set(named.length > 0 ? named : [0]);
  const notes = new Set<string>();
  const gone = journal.unsent.filter(({ noteId }, place) => {
    if (refused.has(place)) notes.add(noteId);
    return notes.has(noteId);
  });
  return {
    journal: { ...journal, unsent: journal.unsent.filter((edit) => !gone.includes(edit)) },
    gone: gone.map(({ id }) => id),
  };
}
