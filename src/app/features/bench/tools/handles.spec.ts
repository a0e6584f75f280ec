import type { NoteGeometry } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import { handlesOf, shifted, withHandle } from './handles';

const SHAPES: readonly NoteGeometry[] = [
  { type: 'line', a: px(1, 2), b: px(3, 4) },
  { type: 'cross', along: { a: px(1, 2), b: px(3, 4) }, across: null },
  { type: 'cross', along: { a: px(1, 2), b: px(3, 4) }, across: { a: px(5, 6), b: px(7, 8) } },
  { type: 'path', points: [px(1, 2), px(3, 4), px(5, 9)] },
  { type: 'outline', points: [px(1, 2), px(3, 4), px(5, 9)] },
  { type: 'pointer', at: px(1, 2), label: px(3, 4) },
];

describe('the handles of a shape', () => {
  it('move one point each and leave all others', () => {
    for (const shape of SHAPES) {
      handlesOf(shape).forEach((_, index) => {
        const moved = handlesOf(withHandle(shape, index, px(100, 200)));
        handlesOf(shape).forEach((before, i) => expect(moved[i]).toEqual(i === index ? px(100, 200) : before));
      });
    }
  });

  it('all go with the shape when it is shifted', () => {
    for (const shape of SHAPES) {
      expect(handlesOf(shifted(shape, 10, -1))).toEqual(handlesOf(shape).map(({ x, y }) => px(x + 10, y - 1)));
    }
  });
});
