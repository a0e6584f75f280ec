import { px } from '@shared/geometry/points';
import { markAt, offLine, rulingThrough, suggestIndex, type RulingMark } from './marks';

const mark = (index: number, x: number, y: number): RulingMark => ({ index, at: px(x, y) });

describe('numbering marks on a ruling', () => {
  it('counts on from the first marks', () => {
    expect(suggestIndex([], px(40, 10))).toBe(0);
    expect(suggestIndex([mark(0, 40, 10)], px(90, 12))).toBe(1);
    expect(suggestIndex([mark(0, 40, 10), mark(1, 90, 12)], px(141, 14))).toBe(2);
  });

  it('skips graduations by the spacing of those that are there', () => {
    expect(suggestIndex([mark(0, 40, 10), mark(1, 90, 10)], px(538, 11))).toBe(10);
    expect(suggestIndex([mark(0, 40, 10), mark(1, 90, 10)], px(-12, 11))).toBe(-1);
  });

  it('follows a number that the person changed', () => {
    expect(suggestIndex([mark(0, 40, 10), mark(10, 540, 10)], px(292, 9))).toBe(5);
  });

  it('finds the line through uneven marks, and how far one is off it', () => {
    const line = rulingThrough([mark(0, 10, 20), mark(2, 50, 24), mark(4, 90, 28)]);
    expect(line?.step.x).toBeCloseTo(20, 12);
    expect(line?.step.y).toBeCloseTo(2, 12);
    expect(line?.zero.x).toBeCloseTo(10, 12);
    expect(offLine(mark(1, 33, 26), line!)).toBeCloseTo(5, 12);
  });

  it('has no line while all marks have one number', () => {
    expect(rulingThrough([mark(3, 10, 20), mark(3, 50, 20)])).toBeNull();
  });

  it('takes hold of the nearest mark within reach', () => {
    const marks = [mark(0, 10, 10), mark(1, 18, 10)];
    expect(markAt(marks, px(15, 10), 6)).toBe(1);
    expect(markAt(marks, px(30, 10), 6)).toBeNull();
  });
});
