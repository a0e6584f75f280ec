// @vitest-environment jsdom
import { expect, it } from 'vitest';
import { choosePage } from '../../../server/pictures/iiif-image.js';
import { iiifInfo } from '../../../server/pictures/iiif-info.js';
import { parseIiifRequest } from '../../../server/pictures/iiif-request.js';

interface TileSource {
  readonly width: number;
  readonly height: number;
  readonly maxLevel: number;
  getTileUrl(level: number, x: number, y: number): string;
  getNumTiles(level: number): { x: number; y: number };
}

/** The bench's own viewer reads the description, and every tile that it then asks for is one that can be answered. */
it.each([
  [4000, 3000],
  [1501, 1003],
  [300, 200],
  [9000, 700],
])('a picture of %i × %i opens in the viewer', async (width, height) => {
  const { default: viewer } = (await import('openseadragon')) as unknown as {
    default: { IIIFTileSource: new (info: object) => TileSource };
  };
  const levels = [{ width, height }];
  for (let last = levels[0]!; Math.max(last.width, last.height) > 512; levels.push(last)) {
    last = { width: last.width >> 1, height: last.height >> 1 };
  }
  const id = 'http://localhost:3000/iiif/x~1';
  const source = new viewer.IIIFTileSource(iiifInfo({ id, width, height, levels, licence: 'by' }));
  expect([source.width, source.height]).toEqual([width, height]);
  for (let level = 0; level <= source.maxLevel; level++) {
    const tiles = source.getNumTiles(level);
    for (let x = 0; x < tiles.x; x++) {
      for (let y = 0; y < tiles.y; y++) {
        const url = source.getTileUrl(level, x, y);
        expect(url.startsWith(`${id}/`)).toBe(true);
        const [region = '', size = '', rotation = '', file = ''] = url.slice(id.length + 1).split('/');
        const request = parseIiifRequest({ region, size, rotation, file }, { width, height });
        expect(request.size.width <= 512 && request.size.height <= 512).toBe(true);
        // cut from the page of its own reduction: no tile makes the server read many times its size
        const { crop } = choosePage(levels, request.region, request.size);
        expect([url, crop.width * crop.height <= 4 * 512 * 512]).toEqual([url, true]);
      }
    }
  }
});
