import type { Note } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import type { Scale } from '@shared/scale/scale';
import { bodyOf, seriesFigures } from './series-figures';

const SCALE: Scale = { umPerPxX: 0.1, umPerPxY: 0.1, relativeUncertainty: 0.01, grounds: 'calibrated' };

/** A body drawn along x and across y, px. */
const spore = (id: string, along: number, across: number | null): Note => ({
  id,
  imageId: 'image',
  layer: 'me',
  kind: 'measure',
  seriesId: 'series',
  text: '',
  geometry: {
    type: 'cross',
    along: { a: px(0, 50), b: px(along, 50) },
    across: across === null ? null : { a: px(40, 50 - across / 2), b: px(40, 50 + across / 2) },
  },
});
const measured = (notes: readonly Note[], scale: Scale | null) =>
  seriesFigures(
    'spore',
    notes.flatMap((note) => bodyOf(note, 'spore', scale) ?? []),
    1,
  );

describe('a series in numbers', () => {
  const notes = [spore('a', 84, 60), spore('b', 80, 64), spore('c', 88, 62)];

  it('has means, ratios and the notation in µm', () => {
    const figures = measured(notes, SCALE);
    expect(figures?.unit).toBe('µm');
    expect(figures?.dimensions.map(({ summary }) => summary.mean)).toEqual([
      expect.closeTo(8.4, 10),
      expect.closeTo(6.2, 10),
    ]);
    expect(figures?.q?.mean).toBeCloseTo((84 / 60 + 80 / 64 + 88 / 62) / 3, 10);
    expect(figures?.notation).toBe('[3/1/1] 8.0–8.8 × 6.0–6.4 µm (n = 3), Q = 1.25–1.42, Qm = 1.36');
  });

  it('is in pixels, without notation, where there is no scale; ratios stay', () => {
    const figures = measured(notes, null);
    expect(figures).toMatchObject({ unit: 'px', grounds: 'none', notation: null, n: 3 });
    expect(figures?.dimensions[0]?.summary.mean).toBeCloseTo(84, 10);
    expect(figures?.q?.mean).toBeCloseTo(measured(notes, SCALE)?.q?.mean ?? 0, 10);
  });

  it('leaves pixels out of a mean in µm, and says how many', () => {
    const bodies = [bodyOf(spore('a', 84, 60), 'spore', SCALE)!, bodyOf(spore('b', 800, 640), 'spore', null)!];
    expect(seriesFigures('spore', bodies, 1)).toMatchObject({ n: 1, leftOut: 1 });
  });

  it('counts a body of which only the length is drawn yet', () => {
    const figures = measured([spore('a', 84, 60), spore('b', 80, null)], SCALE);
    expect(figures?.dimensions.map(({ summary }) => summary.n)).toEqual([2, 1]);
  });

  it('has no body for a shape that its structure does not take', () => {
    const line: Note = { ...spore('a', 84, 60), geometry: { type: 'path', points: [px(0, 0), px(3, 4)] } };
    expect(bodyOf(line, 'spore', SCALE)).toBeNull();
  });
});
