import { contributions, groundsLine, scaleLine } from './scale-words';

const NO_BREAK = /\u00a0/g;

describe('a scale in words', () => {
  it('is rounded to its uncertainty', () => {
    const line = scaleLine({
      umPerPxX: 0.073215,
      umPerPxY: 0.073215,
      relativeUncertainty: 0.0045,
      grounds: 'calibrated',
    });
    expect(line).toEqual({ value: '0.07322 µm', doubt: '± 0.9 %', axes: null });
  });

  it('shows an estimate with few digits and its range', () => {
    const line = scaleLine({ umPerPxX: 12.3, umPerPxY: 12.3, relativeUncertainty: 0.115, grounds: 'estimated' });
    expect(line.value.replace(NO_BREAK, ' ')).toBe('≈ 10 µm');
    expect(line.doubt).toContain('–');
  });

  it('tells the axes apart where pixels are not square', () => {
    const line = scaleLine({ umPerPxX: 0.1, umPerPxY: 0.11, relativeUncertainty: 0.001, grounds: 'calibrated' });
    expect(line.axes).toContain('0.11');
  });

  it('names what it is known by', () => {
    const reference = {
      by: 'reference',
      objectId: 'euro-1',
      lengthUm: 23_250,
      toleranceUm: 100,
      a: { x: 0, y: 0 },
      b: { x: 300, y: 400 },
    } as const;
    expect(groundsLine({ provenance: reference, setAt: '2026-02-15T10:00:00Z' })).toContain('1 euro');
    const parts = contributions(reference, 0.003);
    // a rectangular ±100 µm of 23,250 is 0.248 %; two ends of half a pixel over 500 are 0.141 %
    expect(parts.map(({ relative }) => relative)).toEqual([expect.closeTo(0.002483, 6), expect.closeTo(0.001414, 6)]);
  });
});
