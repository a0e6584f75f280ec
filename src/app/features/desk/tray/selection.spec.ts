import { describe, expect, it } from 'vitest';
import { choose, extendTo, keepPresent, NOTHING, step, toggle } from './selection';

const ORDER = ['a', 'b', 'c', 'd', 'e'];
const idsOf = ({ ids }: { ids: ReadonlySet<string> }) => [...ids].toSorted();

describe('choosing pictures', () => {
  it('chooses one and lets it go again, leaving the others', () => {
    const two = toggle(toggle(NOTHING, 'b'), 'd');
    expect(idsOf(two)).toEqual(['b', 'd']);
    expect(idsOf(toggle(two, 'b'))).toEqual(['d']);
  });

  it('chooses from the last touched up to here, in either direction', () => {
    expect(idsOf(extendTo(toggle(NOTHING, 'b'), 'd', ORDER))).toEqual(['b', 'c', 'd']);
    expect(idsOf(extendTo(toggle(NOTHING, 'd'), 'b', ORDER))).toEqual(['b', 'c', 'd']);
  });

  it('keeps its anchor while a range grows', () => {
    const grown = extendTo(extendTo(toggle(NOTHING, 'b'), 'c', ORDER), 'e', ORDER);
    expect(idsOf(grown)).toEqual(['b', 'c', 'd', 'e']);
    expect(grown.anchor).toBe('b');
  });

  it('begins a range at this one when nothing was touched', () => {
    expect(idsOf(extendTo(NOTHING, 'c', ORDER))).toEqual(['c']);
  });

  it('lets go of what has left the list, and of an anchor there', () => {
    const kept = keepPresent(choose(['a', 'b']), ['b', 'c']);
    expect(idsOf(kept)).toEqual(['b']);
    expect(kept.anchor).toBeNull();
  });

  it('stays the same object when nothing left, so that nothing is drawn anew', () => {
    const chosen = choose(['a']);
    expect(keepPresent(chosen, ORDER)).toBe(chosen);
  });
});

describe('walking over rows of 3, 1 and 2', () => {
  const rows = [['a', 'b', 'c'], ['d'], ['e', 'f']];

  it('runs on from the end of a row into the next, and back', () => {
    expect(step(rows, { row: 0, column: 2 }, 'right')).toEqual({ row: 1, column: 0 });
    expect(step(rows, { row: 1, column: 0 }, 'left')).toEqual({ row: 0, column: 2 });
  });

  it('ends on the last picture of a shorter row', () => {
    expect(step(rows, { row: 0, column: 2 }, 'down')).toEqual({ row: 1, column: 0 });
  });

  it('stops at the edges', () => {
    expect(step(rows, { row: 0, column: 0 }, 'left')).toEqual({ row: 0, column: 0 });
    expect(step(rows, { row: 0, column: 1 }, 'up')).toEqual({ row: 0, column: 1 });
    expect(step(rows, { row: 2, column: 1 }, 'right')).toEqual({ row: 2, column: 1 });
    expect(step(rows, { row: 2, column: 0 }, 'down')).toEqual({ row: 2, column: 0 });
  });

  it('goes to the ends of a row and of all', () => {
    expect(step(rows, { row: 0, column: 1 }, 'rowEnd')).toEqual({ row: 0, column: 2 });
    expect(step(rows, { row: 0, column: 1 }, 'last')).toEqual({ row: 2, column: 1 });
  });
});
