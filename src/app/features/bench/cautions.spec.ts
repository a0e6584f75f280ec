import { reagentCaution } from './cautions';

describe('the caution about reagents', () => {
  it('comes with the reagents that it names, in medium or stain, and with no other', () => {
    for (const medium of ['KOH 3 %', 'ammonia', 'chloral hydrate', "Melzer's reagent"]) {
      expect(reagentCaution({ medium, stain: '' })).not.toBeNull();
      expect(reagentCaution({ medium: '', stain: medium })).not.toBeNull();
    }
    for (const medium of ['water', 'glycerol', '']) expect(reagentCaution({ medium, stain: 'cotton blue' })).toBeNull();
    expect(reagentCaution(null)).toBeNull();
  });
});
