import { describe, expect, it } from 'vitest';
import type { CalibrationView } from '@shared/contracts/rigs';
import { departure, look, type Looked } from './calibration-look';
import { percentWords, scaleWords } from './calibration-words';

const LOOKED: Looked = { marks: [], crossMarks: [], spacingUm: 10, toleranceUm: 1.5, width: 5000, height: 4000 };
const at = (x: number, y: number, index: number) => ({ at: { x, y }, index });

/** Numbers and units stand together by no-break spaces, which no test's author can see. */
const spaced = (text: string) => text.replaceAll('\u00A0', ' ');

function fitted(changes: Partial<Looked>) {
  const seen = look({ ...LOOKED, ...changes });
  if (seen.state !== 'fit') throw new Error(seen.state);
  return seen;
}

describe('the live fit', () => {
  it('waits for two marks', () => {
    expect(look({ ...LOOKED, marks: [at(10, 10, 0)] }).state).toBe('too-few');
  });

  // 1 mm over 4650 px: 1000/4650 = 0.21505 µm/px. Marks: √2 × 0.5/4650 = 0.0152 %; micrometer: 1.5/√3/1000 = 0.0866 %.
  it('agrees with the worked example of 1 mm over 4650 px', () => {
    const seen = fitted({ marks: [at(100, 2000, 0), at(4750, 2000, 100)] });
    expect(seen.scale.umPerPxX).toBeCloseTo(0.2150538, 6);
    expect(seen.fromMarks).toBeCloseTo(0.000152, 6);
    expect(seen.fromMicrometer).toBeCloseTo(0.000866, 6);
    expect(seen.spanShare).toBeCloseTo(0.93);
    expect(spaced(scaleWords(seen.scale))).toBe('0.21505 ± 0.00038 µm/px');
    expect(spaced(percentWords(seen.scale.relativeUncertainty))).toBe('0.18 %');
  });

  it('counts graduations that were skipped by their numbers', () => {
    const all = fitted({ marks: [at(0, 5, 0), at(465, 5, 10), at(930, 5, 20)] });
    const some = fitted({ marks: [at(0, 5, 0), at(930, 5, 20)] });
    expect(all.scale.umPerPxX).toBeCloseTo(some.scale.umPerPxX, 12);
  });

  it('tells x from y with a second ruling across: 200 µm over 1000 px, and over 800', () => {
    const seen = fitted({
      marks: [at(100, 50, 0), at(1100, 50, 20)],
      crossMarks: [at(50, 100, 0), at(50, 900, 20)],
    });
    expect(seen.scale.umPerPxX).toBeCloseTo(0.2, 10);
    expect(seen.scale.umPerPxY).toBeCloseTo(0.25, 10);
  });

  it('says what is wrong with the marks by its code', () => {
    expect(look({ ...LOOKED, marks: [at(10, 10, 0), at(14, 10, 1)] })).toMatchObject({ code: 'reference-too-short' });
    expect(look({ ...LOOKED, marks: [at(10, 10, 3), at(900, 10, 3)] })).toMatchObject({ state: 'problem' });
    expect(look({ ...LOOKED, marks: [at(10, 10, 0), at(900, 10, 9)], spacingUm: Number.NaN })).toMatchObject({
      code: 'not-positive',
    });
  });
});

describe('holding a new scale against the last', () => {
  const { scale } = fitted({ marks: [at(100, 2000, 0), at(4750, 2000, 100)] });
  const last = (umPerPxX: number) => ({ umPerPxX, relativeUncertainty: 0.001 }) as CalibrationView;

  it('is quiet within both uncertainties', () => {
    expect(departure(scale, last(0.2152))).toBeNull();
  });

  it('notices another objective', () => {
    expect(departure(scale, last(0.43))).toBeCloseTo(-0.5, 2);
  });
});
