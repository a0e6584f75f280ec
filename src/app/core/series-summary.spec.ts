import type { SeriesView } from '@shared/contracts/series';
import { groundsOf, summaryOf, valuesUm } from './series-summary';

type Body = SeriesView['bodies'][number];
const body = (lengthUm: number | null, widthUm: number | null, change: Partial<Body> = {}): Body => ({
  noteId: 'n',
  imageId: 'i',
  grounds: 'calibrated',
  scaleRelativeUncertainty: 0.01,
  lengthPx: lengthUm === null ? null : lengthUm * 10,
  widthPx: widthUm === null ? null : widthUm * 10,
  lengthUm,
  widthUm,
  lengthU: lengthUm === null ? null : 0.1,
  widthU: widthUm === null ? null : 0.1,
  ...change,
});

describe('summaryOf', () => {
  it('takes the mean of one dimension', () => {
    // lengths 8, 9, 10; widths 4, 4, 5
    const bodies = [body(8, 4), body(9, 4), body(10, 5)];
    expect(summaryOf({ bodies }, 'length')).toMatchObject({ n: 3, mean: 9 });
    expect(summaryOf({ bodies }, 'width')?.mean).toBeCloseTo(13 / 3);
  });

  it('lets the scale’s error stay however many are measured', () => {
    // equal values have no scatter: u is 1 % of 9 µm
    const bodies = Array.from({ length: 25 }, () => body(9, null));
    expect(summaryOf({ bodies }, 'length')?.u).toBeCloseTo(0.09);
  });

  it('passes over bodies of a picture without scale', () => {
    const unscaled = body(null, null, { lengthPx: 90, grounds: 'none', scaleRelativeUncertainty: null });
    expect(summaryOf({ bodies: [body(8, null), unscaled] }, 'length')?.n).toBe(1);
    expect(summaryOf({ bodies: [unscaled] }, 'length')).toBeNull();
  });

  it('takes ratios from pixels where there is no scale', () => {
    const unscaled = body(null, null, { lengthPx: 90, widthPx: 45, grounds: 'none', scaleRelativeUncertainty: null });
    expect(summaryOf({ bodies: [unscaled] }, 'q')?.mean).toBe(2);
  });
});

describe('groundsOf', () => {
  it('is as weak as the weakest', () => {
    expect(groundsOf({ bodies: [body(8, 4), body(8, 4, { grounds: 'estimated' })] })).toBe('estimated');
    expect(groundsOf({ bodies: [body(8, 4), body(8, 4, { grounds: 'none' })] })).toBe('calibrated');
    expect(groundsOf({ bodies: [body(8, 4, { grounds: 'none' })] })).toBeNull();
  });
});

describe('valuesUm', () => {
  it('keeps the dimensions apart and leaves out what is not measured', () => {
    const bodies = [body(8, 4), body(9, null)];
    expect(valuesUm({ bodies }, 'length')).toEqual([8, 9]);
    expect(valuesUm({ bodies }, 'width')).toEqual([4]);
  });
});
