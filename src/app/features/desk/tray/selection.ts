/**
 * Which pictures of a list are chosen. Plain data: each step answers a new one.
 * `anchor` is where a range begins: the last that was chosen or let go by itself.
 */
export interface Selection {
  readonly ids: ReadonlySet<string>;
  readonly anchor: string | null;
}

export const NOTHING: Selection = { ids: new Set(), anchor: null };

/** Chooses one, or lets it go. The others stay as they are: on a touch screen there is no modifier to hold. */
export function toggle(selection: Selection, id: string): Selection {
  const ids = new Set(selection.ids);
  if (!ids.delete(id)) ids.add(id);
  return { ids, anchor: id };
}

/** Chooses everything from the anchor to this one, in the order shown. Without an anchor, just this one. */
export function extendTo(selection: Selection, id: string, order: readonly string[]): Selection {
  const from = selection.anchor === null ? -1 : order.indexOf(selection.anchor);
  const to = order.indexOf(id);
  if (from === -1 || to === -1) return { ids: new Set([...selection.ids, id]), anchor: id };
  const range = order.slice(Math.min(from, to), Math.max(from, to) + 1);
  return { ids: new Set([...selection.ids, ...range]), anchor: selection.anchor };
}

/** Exactly these. */
export function choose(ids: readonly string[]): Selection {
  return { ids: new Set(ids), anchor: ids[0] ?? null };
}

/** What of it is still there after the list changed. */
export function keepPresent(selection: Selection, order: readonly string[]): Selection {
  const present = new Set(order);
  if ([...selection.ids].every((id) => present.has(id))) return selection;
  const anchor = selection.anchor !== null && present.has(selection.anchor) ? selection.anchor : null;
  return { ids: new Set([...selection.ids].filter((id) => present.has(id))), anchor };
}

export type Step = 'left' | 'right' | 'up' | 'down' | 'rowStart' | 'rowEnd' | 'first' | 'last';

/**
 * Where the keyboard's focus goes in rows of unequal length. It stops at the edges; going up or down into a
 * shorter row ends on its last picture.
 *
 * @param rows     ids, row by row, none of them empty
 * @param position row and column of now
 */
export function step(
  rows: readonly (readonly string[])[],
  position: { readonly row: number; readonly column: number },
  to: Step,
): { row: number; column: number } {
  const { row, column } = position;
  const lastRow = rows.length - 1;
  const lengthOf = (r: number) => rows[r]?.length ?? 0;
  const into = (r: number) => ({ row: r, column: Math.min(column, lengthOf(r) - 1) });
  switch (to) {
    case 'left':
      if (column > 0) return { row, column: column - 1 };
      return row > 0 ? { row: row - 1, column: lengthOf(row - 1) - 1 } : { row, column };
    case 'right':
      if (column < lengthOf(row) - 1) return { row, column: column + 1 };
      return row < lastRow ? { row: row + 1, column: 0 } : { row, column };
    case 'up':
      return into(Math.max(0, row - 1));
    case 'down':
      return into(Math.min(lastRow, row + 1));
    case 'rowStart':
      return { row, column: 0 };
    case 'rowEnd':
      return { row, column: lengthOf(row) - 1 };
    case 'first':
      return { row: 0, column: 0 };
    case 'last':
      return { row: lastRow, column: lengthOf(lastRow) - 1 };
  }
}
