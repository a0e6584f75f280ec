import { describe, expect, it } from 'vitest';
import { eyepieceValue } from '../../../shared/scale/eyepiece.js';
import { codeOf, expectClose } from '../../support/close.js';

describe('eyepiece graticule', () => {
  it('is worth what the stage micrometer beneath it says', () => {
    // College of the Canyons, "Ocular and Stage Micrometers", examples 1 and 2: printed 5.5 and 1.4 µm
    expectClose(eyepieceValue({ stage: 12, eyepiece: 22 }), 5.4545, 1e-4);
    expectClose(eyepieceValue({ stage: 1, eyepiece: 7 }), 1.4286, 1e-4);
    expect(eyepieceValue({ stage: 10, eyepiece: 50 })).toBe(2);
    expect(eyepieceValue({ stage: 5, eyepiece: 20 }, 100)).toBe(25);
  });

  it('refuses rulings that meet nowhere', () => {
    expect(codeOf(() => eyepieceValue({ stage: 0, eyepiece: 7 }))).toBe('not-positive');
    expect(codeOf(() => eyepieceValue({ stage: 3, eyepiece: NaN }))).toBe('not-positive');
  });
});
