import { describe, expect, it } from 'vitest';
import { choosePage } from '../../../server/pictures/iiif-image.js';
import { type IiifRequest, parseIiifRequest } from '../../../server/pictures/iiif-request.js';
import type { HttpProblem } from '../../../server/problem.js';

/** The picture of the specification's own examples. */
const PICTURE = { width: 300, height: 200 };

const parse = (
  parts: { region?: string; size?: string; rotation?: string; file?: string },
  maxArea?: number,
): IiifRequest =>
  parseIiifRequest({ region: 'full', size: 'max', rotation: '0', file: 'default.jpg', ...parts }, PICTURE, maxArea);
const refused = (parts: Parameters<typeof parse>[0], maxArea?: number): string => {
  try {
    parse(parts, maxArea);
  } catch (error) {
    return `${(error as HttpProblem).status} ${(error as HttpProblem).code}`;
  }
  return 'not refused';
};

describe('a region', () => {
  // IIIF Image API 3.0, §4.1, table of examples
  it.each([
    ['full', [0, 0, 300, 200]],
    ['square', [50, 0, 200, 200]],
    ['125,15,120,140', [125, 15, 120, 140]],
    ['pct:41.6,7.5,40,70', [125, 15, 120, 140]],
    ['125,15,200,200', [125, 15, 175, 185]],
    ['pct:41.6,7.5,66.6,100', [125, 15, 175, 185]],
  ])('%s is read as the specification shows it', (region, [x, y, width, height]) => {
    expect(parse({ region }).region).toEqual({ x, y, width, height });
  });

  it.each([
    '300,0,10,10',
    '0,200,10,10',
    '0,0,0,10',
    '10,10,10,0',
    'pct:100,0,10,10',
    '-1,0,10,10',
    '1.5,0,10,10',
    'pct:0,0,NaN,1',
    '1,2,3',
    'half',
    '',
  ])('%s is refused', (region) => {
    expect(refused({ region })).toBe('400 iiif-region');
  });

  it('by percent neither overlaps its neighbour nor leaves a gap', () => {
    const thirds = ['pct:0,0,33.3,100', 'pct:33.3,0,33.3,100', 'pct:66.6,0,33.4,100'].map(
      (region) => parse({ region }).region,
    );
    expect(thirds.map(({ x, width }) => [x, x + width])).toEqual([
      [0, 100],
      [100, 200],
      [200, 300],
    ]);
  });
});

describe('a size', () => {
  // IIIF Image API 3.0, §4.2, table of examples
  it.each([
    ['max', [300, 200]],
    ['150,', [150, 100]],
    ['^360,', [360, 240]],
    [',150', [225, 150]],
    ['^,240', [360, 240]],
    ['pct:50', [150, 100]],
    ['^pct:120', [360, 240]],
    ['225,100', [225, 100]],
    ['^360,360', [360, 360]],
    ['!225,100', [150, 100]],
    ['^!360,360', [360, 240]],
  ])('%s is read as the specification shows it', (size, [width, height]) => {
    expect(parse({ size }).size).toEqual({ width, height });
  });

  it('of max grows to the limit only when asked to', () => {
    expect(parse({ size: '^max' }, 600 * 400).size).toEqual({ width: 600, height: 400 });
    expect(parse({ size: 'max' }, 150 * 100).size).toEqual({ width: 150, height: 100 });
  });

  it('in a box larger than the region is the region', () => {
    expect(parse({ size: '!4000,4000' }).size).toEqual({ width: 300, height: 200 });
  });

  it('of a very narrow region is never nothing', () => {
    expect(parse({ region: '0,0,300,1', size: '3,' }).size).toEqual({ width: 3, height: 1 });
  });

  it.each([
    'full',
    '301,',
    ',201',
    '301,10',
    'pct:101',
    '0,',
    ',0',
    '0,0',
    '!0,10',
    'pct:0',
    '!150,',
    ',',
    '^',
    '-5,',
    '1e3,',
    'pct:',
    '99999999999,',
  ])('%s is refused', (size) => {
    expect(refused({ size })).toBe('400 iiif-size');
  });

  it('over the limit of area is refused, instead of being made smaller in silence', () => {
    expect(refused({ size: '^9000,' })).toBe('400 iiif-size');
    expect(refused({ size: '^30000,30000' })).toBe('400 iiif-size');
  });
});

describe('rotation, quality and format', () => {
  it('turn by right angles, mirrored first', () => {
    expect(parse({ rotation: '!90' })).toMatchObject({ mirrored: true, rotation: 90 });
    expect(parse({ rotation: '360' })).toMatchObject({ mirrored: false, rotation: 0 });
    expect(parse({ rotation: '270.0' })).toMatchObject({ rotation: 270 });
  });

  it.each(['45', '-90', '361', '!', ''])('%s is refused as a rotation', (rotation) => {
    expect(refused({ rotation })).toBe('400 iiif-rotation');
  });

  it.each(['default.gif', 'sepia.jpg', 'default', '.jpg', 'default.jpg.exe'])('%s is refused', (file) => {
    expect(refused({ file })).toBe('400 iiif-quality');
  });

  it('are read for what they are', () => {
    expect(parse({ file: 'gray.png' })).toMatchObject({ quality: 'gray', format: 'png' });
  });
});

describe('the page that a tile is cut from', () => {
  const levels = [
    [4000, 3000],
    [2000, 1500],
    [1000, 750],
    [500, 375],
  ].map(([width, height]) => ({ width: width!, height: height! }));

  it('is the one of its own reduction, so that pixels are copied and not made anew', () => {
    expect(choosePage(levels, { x: 2048, y: 1024, width: 1024, height: 1024 }, { width: 512, height: 512 })).toEqual({
      page: 1,
      crop: { left: 1024, top: 512, width: 512, height: 512 },
    });
    // at the edge: what is left
    expect(choosePage(levels, { x: 2048, y: 2048, width: 1952, height: 952 }, { width: 488, height: 238 })).toEqual({
      page: 2,
      crop: { left: 512, top: 512, width: 488, height: 238 },
    });
  });

  it('is a finer one where a coarse one would move the region', () => {
    expect(choosePage(levels, { x: 3, y: 1, width: 1000, height: 1000 }, { width: 500, height: 500 }).page).toBe(0);
    expect(choosePage(levels, { x: 3, y: 1, width: 3000, height: 2900 }, { width: 300, height: 290 }).page).toBe(1);
  });
});
