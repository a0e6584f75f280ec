import { fullSource, pageWords, shortSource } from './source-words';

describe('shortSource', () => {
  it('keeps the authors and the year', () => {
    expect(shortSource('Macbride T.H. 1922 The North American Slime-Moulds, new ed.', 1922)).toBe('Macbride 1922');
    expect(shortSource('Ellis M.B. & Ellis J.P. 1997 Microfungi on land plants', 1997)).toBe('Ellis & Ellis 1997');
    expect(shortSource('Lister, A monograph of the Mycetozoa', null)).toBe('Lister, year unknown');
  });
});

describe('fullSource', () => {
  it('does not say a year twice', () => {
    expect(fullSource('Macbride T.H. 1922 Slime-Moulds', 1922)).toBe('Macbride T.H. 1922 Slime-Moulds');
    expect(fullSource('Macbride, Slime-Moulds', 1922)).toBe('Macbride, Slime-Moulds, 1922');
  });

  it('says what is unknown', () => {
    expect(fullSource('Macbride, Slime-Moulds', null)).toBe('Macbride, Slime-Moulds, year unknown');
    expect(fullSource('', null)).toBe('source and year unknown');
  });
});

describe('pageWords', () => {
  it('writes ranges with their dash, and leaves other pages as they are', () => {
    expect(pageWords('264-265')).toBe('264–265');
    expect(pageWords('19, 27-28')).toBe('19, 27–28');
    expect(pageWords('xii')).toBe('xii');
  });

  it('says that the page is unknown', () => {
    expect(pageWords('')).toBe('unknown');
  });
});
