export interface Axis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
  /** places after the point that tell neighbouring ticks apart */
  readonly decimals: number;
}

/** Steps of 1, 2 or 5, at most this many. */
const MOST_TICKS = 8;

/** A round axis that holds all values, with some room at both ends. A single value gets a tenth around it. */
export function axisFor(values: readonly number[]): Axis {
  const finite = values.filter(Number.isFinite);
  const [least, most] = finite.length > 0 ? [Math.min(...finite), Math.max(...finite)] : [0, 1];
  const room = (most - least) * 0.08 || Math.abs(most) * 0.1 || 1;
  const [from, to] = [least - room, most + room];
  const rough = (to - from) / MOST_TICKS;
  const power = Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((m) => Number(`${m}e${power}`)).find((s) => s >= rough) ?? rough;
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const first = Math.floor(from / step);
  const ticks = Array.from({ length: Math.ceil(to / step) - first + 1 }, (_, i) =>
    Number(((first + i) * step).toFixed(decimals)),
  );
  const shown = least >= 0 ? ticks.filter((tick) => tick >= 0) : ticks;
  return { low: shown[0] as number, high: shown[shown.length - 1] as number, ticks: shown, decimals };
}

/**
 * Rows for dots that would lie on each other: each goes to the first row where it has room.
 * @param apart the least distance of two dots in one row, in the values' unit
 */
export function stacked(
  values: readonly number[],
  apart: number,
): readonly { readonly value: number; readonly row: number }[] {
  const lastInRow: number[] = [];
  return [...values]
    .sort((a, b) => a - b)
    .map((value) => {
      const free = lastInRow.findIndex((last) => value - last >= apart);
      const row = free < 0 ? lastInRow.length : free;
      lastInRow[row] = value;
      return { value, row };
    });
}
