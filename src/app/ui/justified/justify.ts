/**
 * Where one tile stands in a justified wall: how many share its row, and which part of the row's width
 * (without gaps) is its own. Heights within a row are then equal, because every tile keeps its aspect.
 */
export interface Place {
  readonly inRow: number;
  readonly share: number;
}

/**
 * A wall of rows, told by ratios alone: nothing has to be measured on the page, so the server can lay
 * it out as well as the browser, and it stands still when a picture or a script arrives.
 *
 * A row ends where the sum of its aspects comes nearest to `rowAspect` (nearest as a ratio: twice and
 * half as high are equally far). The rows before the last depend only on the tiles before them, so that
 * adding tiles moves no row that is complete.
 *
 * @param aspects   width over height of each picture, positive
 * @param rowAspect wanted width over height of a row: page width over row height
 * @returns one place per aspect; the last row is stretched only when it is nearly full
 */
export function justify(aspects: readonly number[], rowAspect: number): Place[] {
  const places: Place[] = [];
  let row: number[] = [];
  for (const aspect of aspects) {
    const before = sum(row);
    const withIt = before + aspect;
    if (row.length > 0 && withIt > rowAspect && isNearer(before, withIt, rowAspect)) {
      places.push(...placesOf(row, before));
      row = [];
    }
    row.push(aspect);
    if (sum(row) >= rowAspect) {
      places.push(...placesOf(row, sum(row)));
      row = [];
    }
  }
  const rest = sum(row);
  return [...places, ...placesOf(row, rest >= NEARLY_FULL * rowAspect ? rest : rowAspect)];
}

/** From here on a last row is stretched: it grows at most a fifth higher than the others. */
const NEARLY_FULL = 0.8;

function placesOf(row: readonly number[], whole: number): Place[] {
  return row.map((aspect) => ({ inRow: row.length, share: aspect / whole }));
}

function isNearer(before: number, withIt: number, wanted: number): boolean {
  return wanted / before < withIt / wanted;
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
