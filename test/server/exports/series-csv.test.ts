import { describe, expect, it } from 'vitest';
import { type SeriesFile, seriesCsv, seriesFileName } from '../../../server/exports/series-csv.js';

const FILE: SeriesFile = {
  findNumber: 'CW-214',
  name: 'Trichia varia',
  medium: '',
  stain: '',
  series: {
    id: 's',
    findId: 'f',
    structure: 'spore',
    preparation: { id: 'p', title: 'slide 1' },
    edgeRule: 'outer',
    ornamentIncluded: true,
    observer: { id: 'o', name: '=HYPERLINK("http://evil.example")' },
    bodies: [
      {
        noteId: 'n',
        imageId: 'i',
        grounds: 'calibrated',
        scaleRelativeUncertainty: 0.002,
        lengthPx: 50,
        widthPx: 40,
        lengthUm: 12.5,
        widthUm: 10,
        lengthU: 0.18,
        widthU: 0.17,
      },
      {
        noteId: 'm',
        imageId: 'i',
        grounds: 'none',
        scaleRelativeUncertainty: null,
        lengthPx: 48,
        widthPx: null,
        lengthUm: null,
        widthUm: null,
        lengthU: null,
        widthU: null,
      },
      {
        noteId: 'o',
        imageId: 'i',
        grounds: 'none',
        scaleRelativeUncertainty: null,
        lengthPx: 60,
        widthPx: 40,
        lengthUm: null,
        widthUm: null,
        lengthU: null,
        widthU: null,
      },
    ],
    createdAt: '2026-03-01T09:00:00.000Z',
    mayMeasure: false,
  },
};

describe('the file of a series', () => {
  it('begins with what the values are of, then has a row for each body, with units', () => {
    const lines = seriesCsv(FILE).split('\r\n');
    expect(lines[0]).toBe('\uFEFFfind,CW-214');
    expect(lines).toContain('ornament,included');
    expect(lines).toContain('medium,not said');
    expect(lines.slice(-5)).toEqual([
      'body,length (µm),u length (µm),width (µm),u width (µm),Q (1),length (px),width (px),scale known by,u scale (fraction),picture',
      '1,12.5,0.18,10,0.17,1.25,50,40,calibrated,0.002,i',
      '2,,,,,,48,,none,,i',
      '3,,,,,1.5,60,40,none,,i',
      '',
    ]);
  });

  it('holds nothing that a spreadsheet would run', () => {
    for (const name of ['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '\r=1']) {
      const text = seriesCsv({ ...FILE, series: { ...FILE.series, observer: { id: 'o', name } } });
      expect(text).toMatch(/observer,"?'/);
    }
  });

  it('has a name that any file system takes', () => {
    const named = (structure: string): string =>
      seriesFileName({ findNumber: 'CW-214', series: { ...FILE.series, structure } });
    expect(named('spore')).toBe('CW-214-spore-values.csv');
    expect(named('other:../hilar "peg"')).toBe('CW-214-other-hilar-peg-values.csv');
  });
});
