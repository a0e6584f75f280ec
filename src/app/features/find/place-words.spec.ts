import { aroundWords, coordinateWords, radiusWords } from './place-words';

describe('radiusWords', () => {
  it('rounds outward to two digits, so that the place is never said to be better known than it is', () => {
    expect(radiusWords(1234)).toBe('within 1.3\u00A0km');
    expect(radiusWords(851)).toBe('within 860\u00A0m');
    expect(radiusWords(12)).toBe('within 12\u00A0m');
    expect(radiusWords(12_000)).toBe('within 12\u00A0km');
  });

  it('keeps small radii whole', () => {
    expect(radiusWords(3.2)).toBe('within 4\u00A0m');
  });

  it('says nothing of an unknown one', () => {
    expect(radiusWords(null)).toBeNull();
  });
});

describe('coordinateWords', () => {
  it('writes hemispheres instead of signs', () => {
    expect(coordinateWords({ latitude: 55.5, longitude: -3.25 })).toBe('55.5°\u00A0N, 3.25°\u00A0W');
    expect(coordinateWords({ latitude: -10, longitude: 20 })).toBe('10°\u00A0S, 20°\u00A0E');
  });

  it('has nothing to write where one of them is missing', () => {
    expect(coordinateWords({ latitude: 1, longitude: null })).toBeNull();
  });
});

describe('aroundWords', () => {
  it('says the circle, or what is known of it', () => {
    const place = { latitude: 56.32, longitude: 2.9, uncertaintyM: 1282 };
    expect(aroundWords(place)).toBe('within 1.3\u00A0km of 56.32°\u00A0N, 2.9°\u00A0E');
    expect(aroundWords({ ...place, uncertaintyM: null })).toBe('56.32°\u00A0N, 2.9°\u00A0E');
    expect(aroundWords({ ...place, latitude: null })).toBe('within 1.3\u00A0km');
  });
});
