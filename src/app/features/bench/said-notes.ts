import type { Note } from '@shared/annotations/note';

/** Pointers and rounds with the numbers that stand beside them on the picture, in the order in which they were made. */
export function saidNotes(notes: readonly Note[]): readonly { readonly note: Note; readonly number: number }[] {
  return notes.filter(({ kind }) => kind !== 'measure').map((note, i) => ({ note, number: i + 1 }));
}

/** Characters of a label's line on the picture, and lines of it; the whole stands in the list. */
const LINE = 34;
const MOST_LINES = 3;

/** A note's words in lines that fit beside it. */
export function labelLines(number: number, text: string): readonly string[] {
  const lines: string[] = [];
  let line = String(number);
  for (const word of text.split(/\s+/).filter(Boolean)) {
    const joined = lines.length === 0 && line === String(number) ? `${line} · ${word}` : `${line} ${word}`;
    if (joined.length <= LINE || line === '') line = joined.trimStart();
    else {
      lines.push(line);
      line = word;
    }
  }
  lines.push(line);
  if (lines.length <= MOST_LINES) return lines;
  return [...lines.slice(0, MOST_LINES - 1), `${lines[MOST_LINES - 1] ?? ''}…`];
}
