import type { Note, NoteGeometry } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import { bodyEllipse } from './body-ellipse';
import { boundsOf, noteAt } from './note-hits';

const note = (id: string, geometry: NoteGeometry): Note => ({
  id,
  imageId: 'image',
  layer: 'me',
  kind: 'measure',
  seriesId: 'series',
  geometry,
  text: '',
});
const cross = (x: number, y: number, along: number, across: number): NoteGeometry => ({
  type: 'cross',
  along: { a: px(x - along / 2, y), b: px(x + along / 2, y) },
  across: { a: px(x, y - across / 2), b: px(x, y + across / 2) },
});

describe('what a point means', () => {
  it('is the note whose line is nearest', () => {
    const notes = [
      note('a', { type: 'line', a: px(0, 0), b: px(100, 0) }),
      note('b', { type: 'line', a: px(0, 8), b: px(100, 8) }),
    ];
    expect(noteAt(notes, px(50, 6), 5)?.id).toBe('b');
    expect(noteAt(notes, px(50, 30), 5)).toBeNull();
  });

  it('is the body around it where no line is near, the smaller of two', () => {
    const notes = [note('head', cross(100, 100, 180, 160)), note('spore', cross(140, 120, 40, 30))];
    expect(noteAt(notes, px(150, 127), 2)?.id).toBe('spore');
    expect(noteAt(notes, px(60, 60), 2)?.id).toBe('head');
    expect(noteAt(notes, px(15, 30), 2)).toBeNull();
  });
});

describe('the ellipse of a body', () => {
  it('lies on the long line, moved aside to where the width was taken', () => {
    const ellipse = bodyEllipse({
      type: 'cross',
      along: { a: px(0, 10), b: px(100, 10) },
      across: { a: px(40, -10), b: px(40, 34) },
    });
    expect(ellipse).toEqual({ centre: px(50, 12), along: 50, across: 22, angle: 0 });
  });

  it('is not there before the width is', () => {
    expect(bodyEllipse({ type: 'cross', along: { a: px(0, 10), b: px(100, 10) }, across: null })).toBeNull();
  });
});

it('the bounds of a shape hold all its points', () => {
  expect(boundsOf({ type: 'path', points: [px(4, 9), px(-2, 30), px(8, 1)] })).toEqual({
    low: px(-2, 1),
    high: px(8, 30),
  });
});
