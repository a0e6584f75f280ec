import type { Note } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import { labelLines, saidNotes } from './said-notes';

describe('what is said on a picture', () => {
  it('is numbered without the measures between', () => {
    const note = (id: string, kind: Note['kind']): Note => ({
      id,
      kind,
      imageId: 'i',
      layer: 'me',
      seriesId: null,
      geometry: { type: 'pointer', at: px(1, 2), label: px(3, 4) },
      text: '',
    });
    const numbered = saidNotes([note('a', 'measure'), note('b', 'point'), note('c', 'measure'), note('d', 'round')]);
    expect(numbered.map(({ note: { id }, number }) => [id, number])).toEqual([
      ['b', 1],
      ['d', 2],
    ]);
  });

  it('stands on the picture in short lines, and ends in an ellipsis when it is long', () => {
    expect(labelLines(1, 'warts, not a net')).toEqual(['1 · warts, not a net']);
    expect(labelLines(2, '')).toEqual(['2']);
    expect(labelLines(3, 'these three are unripe, and their walls are thinner')).toEqual([
      '3 · these three are unripe, and',
      'their walls are thinner',
    ]);
    const long = labelLines(4, 'word '.repeat(60));
    expect(long).toHaveLength(3);
    expect(long[2]?.endsWith('…')).toBe(true);
  });
});
