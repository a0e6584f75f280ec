import { justify, type Place } from './justify';

const rowsOf = (places: readonly Place[]): Place[][] => {
  const rows: Place[][] = [];
  for (let at = 0; at < places.length; at += places[at]?.inRow ?? 1) {
    rows.push(places.slice(at, at + (places[at]?.inRow ?? 1)));
  }
  return rows;
};
const total = (row: readonly Place[]) => row.reduce((sum, place) => sum + place.share, 0);

describe('justify', () => {
  it('shares a row by aspect, so that its pictures are equally high', () => {
    // 1.5 + 0.5 + 1 = 3, just the row: shares 1/2, 1/6, 1/3
    const places = justify([1.5, 0.5, 1], 3);
    expect(places.map((place) => place.inRow)).toEqual([3, 3, 3]);
    expect(places.map((place) => place.share)).toEqual([0.5, expect.closeTo(1 / 6), expect.closeTo(1 / 3)]);
  });

  it('leaves a picture to the next row when that brings this one nearer to its height', () => {
    // 1.5 + 1.2 = 2.7 misses 3 by the factor 1.11; with 2 more, 4.7, by 1.57
    expect(rowsOf(justify([1.5, 1.2, 2, 1.1], 3)).map((row) => row.length)).toEqual([2, 2]);
  });

  it('fills every row but the last exactly', () => {
    const aspects = Array.from({ length: 41 }, (_, i) => 0.6 + ((i * 7) % 11) / 8);
    const rows = rowsOf(justify(aspects, 4.2));
    expect(rows.flat()).toHaveLength(41);
    for (const row of rows.slice(0, -1)) expect(total(row)).toBeCloseTo(1, 12);
  });

  it('does not blow up a last row that is far from full', () => {
    expect(justify([1.5, 1.5, 1.2], 3).at(-1)).toEqual({ inRow: 1, share: expect.closeTo(0.4) });
  });

  it('moves no complete row when tiles are added', () => {
    const aspects = [1.5, 0.7, 1.3, 1.5, 1.5, 1, 0.8];
    const before = rowsOf(justify(aspects, 3)).slice(0, -1).flat();
    const after = justify([...aspects, 1.5, 0.6], 3);
    expect(after.slice(0, before.length)).toEqual(before);
  });

  it('gives a picture wider than a row a row of its own', () => {
    expect(justify([5, 1, 1], 2)[0]).toEqual({ inRow: 1, share: 1 });
  });

  it('has nothing to place for an empty wall', () => {
    expect(justify([], 3)).toEqual([]);
  });
});
