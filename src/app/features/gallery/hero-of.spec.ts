import type { GalleryTile } from '@shared/contracts/gallery';
import { heroOf } from './hero-of';

const tile = (change: Partial<GalleryTile>): GalleryTile => ({
  id: '01930000-0000-7000-8000-000000000001',
  revision: 1,
  width: 1600,
  height: 1067,
  altText: '',
  colours: [],
  renditionWidths: [640],
  scale: { umPerPxX: 7, umPerPxY: 7, relativeUncertainty: 0.1, grounds: 'estimated' },
  title: 'Yellow heads on a sleeper',
  light: 'daylight',
  findId: '01930000-0000-7000-8000-000000000002',
  findNumber: 'CW-7',
  taxonId: null,
  name: { name: 'Hemitrichia clavata', authorship: '', rank: 'species', code: 'botanical', qualifier: '' },
  publicPlace: 'an old depot',
  creditLine: 'Imre Waddell',
  licence: 'by-sa',
  ...change,
});

describe('heroOf', () => {
  it('takes the newest, whatever its kind', () => {
    const [micrograph, scene] = [tile({ light: 'bright field' }), tile({})];
    expect(heroOf([micrograph, scene])).toBe(micrograph);
    expect(heroOf([scene, micrograph])).toBe(scene);
  });

  it.each<[string, Partial<GalleryTile>]>([
    ['a find without a name', { name: null }],
    ['a picture without a title', { title: ' ' }],
    ['a picture without a scale', { scale: null }],
    ['a small picture', { width: 1199, height: 800 }],
    ['an upright picture', { width: 1600, height: 2400 }],
  ])('passes over %s', (_what, change) => {
    const fit = tile({});
    expect(heroOf([tile(change), fit])).toBe(fit);
    expect(heroOf([tile(change)])).toBeNull();
  });
});
