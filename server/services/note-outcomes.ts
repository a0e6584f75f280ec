import type { KeptEdit } from '../../shared/contracts/notes.js';
import type { RecordedEdit } from '../db/notes.js';

/**
 * Edits as one reader may have them. A person reads the whole history of their own layer. Of others' they read
 * what came of it, no more than the notes themselves tell: of each note the last edit alone, without what it
 * said before. Words that were taken back before a find became public (a place, mostly) stay taken back.
 *
 * Whoever applies them to the state that they had ends in the same state as by all edits.
 *
 * @param readerId null for a visitor
 * @param edits    in the server's order
 */
export function outcomesFor(readerId: string | null, edits: readonly RecordedEdit[]): KeptEdit[] {
  const counted = edits.filter(({ author, outcome }) => author.id === readerId || outcome !== 'dropped');
  const last = new Map(counted.map(({ edit, seq }) => [edit.noteId, seq]));
  return counted.flatMap(({ seq, author, edit }): KeptEdit[] => {
    if (author.id === readerId) return [{ seq, author, edit }];
    if (last.get(edit.noteId) !== seq) return [];
    const before = edit.after === null && edit.before ? { ...edit.before, text: '' } : null;
    return [{ seq, author, edit: { ...edit, before } }];
  });
}
