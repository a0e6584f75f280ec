import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { toUpright, uprightSize } from '../../../shared/geometry/orientation.js';
import type { Orientation } from '../../../shared/geometry/orientation.js';
import { pathLength, pathPointing } from '../../../shared/geometry/path.js';
import type { ImagePoint } from '../../../shared/geometry/points.js';
import { px } from '../../../shared/geometry/points.js';
import { polygonArea, polygonCentroid, polygonPerimeter } from '../../../shared/geometry/polygon.js';
import { distanceToSegment, segmentDirection, segmentLength } from '../../../shared/geometry/segment.js';
import { codeOf, expectClose } from '../../support/close.js';

/** Thousandths of a pixel: no tinier numbers than pictures have. */
const coordinate = fc.integer({ min: -5_000_000, max: 5_000_000 }).map((thousandths) => thousandths / 1000);
const point = fc.tuple(coordinate, coordinate).map(([x, y]) => px(x, y));
const points = (fewest: number) => fc.array(point, { minLength: fewest, maxLength: 12 });
const turn = (p: ImagePoint, angle: number) =>
  px(p.x * Math.cos(angle) - p.y * Math.sin(angle), p.x * Math.sin(angle) + p.y * Math.cos(angle));

describe('segment', () => {
  it('has length and direction', () => {
    expect(segmentLength({ a: px(10, 20), b: px(310, 420) })).toBe(500);
    expectClose(segmentDirection({ a: px(0, 5), b: px(0, 2) }), -Math.PI / 2, 1e-12);
    expect(segmentDirection({ a: px(3, 3), b: px(3, 3) })).toBeNull();
  });

  it('is as far away as its nearest point', () => {
    const segment = { a: px(0, 0), b: px(10, 0) };
    expect(distanceToSegment(px(4, 3), segment)).toBe(3);
    expect(distanceToSegment(px(13, 4), segment)).toBe(5);
    expect(distanceToSegment(px(3, 4), { a: px(0, 0), b: px(0, 0) })).toBe(5);
  });
});

describe('path', () => {
  const bent = [px(0, 0), px(30, 40), px(30, 100)];

  it('is as long as its pieces', () => {
    expect(pathLength(bent)).toBe(110);
    expectClose(pathLength(bent, { x: 0.2, y: 0.21 }), Math.hypot(6, 8.4) + 12.6, 1e-12);
  });

  it('scales with its scale', () => {
    fc.assert(
      fc.property(points(2), fc.double({ min: 0.01, max: 100, noNaN: true }), (path, k) => {
        expectClose(pathLength(path, { x: k, y: k }), k * pathLength(path), 1e-9);
      }),
    );
  });

  it('depends on its two ends alone while it is straight', () => {
    expectClose(pathPointing([px(0, 0), px(60, 80)]), Math.SQRT2, 1e-12);
    expectClose(pathPointing([px(0, 0), px(30, 40), px(60, 80)]), Math.SQRT2, 1e-12);
    // a square corner adds its own √2: √(1 + 2 + 1)
    expectClose(pathPointing([px(0, 0), px(50, 0), px(50, 50)]), 2, 1e-12);
    expectClose(pathPointing([px(0, 0), px(0, 50)], { x: 0.2, y: 0.21 }), Math.SQRT2 * 0.21, 1e-12);
  });

  it('has an answer for points that coincide', () => {
    expect(pathLength([px(1, 1), px(1, 1)])).toBe(0);
    expectClose(pathPointing([px(1, 1), px(1, 1)]), Math.SQRT2, 1e-12);
  });

  it('refuses one point and no numbers', () => {
    expect(codeOf(() => pathLength([px(1, 1)]))).toBe('too-few-points');
    expect(codeOf(() => pathLength([px(1, 1), px(NaN, 2)]))).toBe('not-finite');
  });
});

describe('polygon', () => {
  const triangle = [px(1000, 2000), px(1006, 2000), px(1000, 2003)];

  it('has area, centre and outline', () => {
    expect(polygonArea(triangle)).toBe(9);
    expect(polygonCentroid(triangle)).toEqual(px(1002, 2001));
    expectClose(polygonPerimeter(triangle), 9 + Math.sqrt(45), 1e-12);
  });

  it('keeps its area when turned, reversed or moved, and takes k² when enlarged', () => {
    fc.assert(
      fc.property(
        points(3),
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.double({ min: 0.1, max: 9, noNaN: true }),
        (shape, angle, k) => {
          const area = polygonArea(shape);
          const slack = 1e-6 * (1 + area); // 10⁸ px² of cancelling products
          expect(Math.abs(polygonArea(shape.map((p) => turn(p, angle))) - area)).toBeLessThan(slack);
          expect(Math.abs(polygonArea([...shape].reverse()) - area)).toBeLessThan(slack);
          expect(Math.abs(polygonArea(shape.map((p) => px(p.x + 300, p.y - 70))) - area)).toBeLessThan(slack);
          expect(Math.abs(polygonArea(shape.map((p) => px(k * p.x, k * p.y))) - k * k * area)).toBeLessThan(
            slack * k * k,
          );
        },
      ),
    );
  });

  it('without area has its centre among its vertices', () => {
    expect(polygonArea([px(0, 0), px(5, 5), px(10, 10)])).toBe(0);
    expect(polygonCentroid([px(0, 0), px(5, 5), px(10, 10)])).toEqual(px(5, 5));
  });

  it('needs three vertices', () => expect(codeOf(() => polygonArea([px(0, 0), px(1, 1)]))).toBe('too-few-points'));
});

describe('orientation', () => {
  const size = { width: 6000, height: 4000 };
  /** The pixel with this index has its middle half a pixel farther. */
  const pixel = (x: number, y: number, orientation: Orientation) => {
    const upright = toUpright(px(x + 0.5, y + 0.5), size, orientation);
    return [upright.x - 0.5, upright.y - 0.5];
  };

  it.each([
    [1, [100, 50]],
    [6, [3949, 100]],
    [3, [5899, 3949]],
    [8, [50, 5899]],
  ] as const)('%d takes pixel (100, 50) of 6000 × 4000 to %j', (orientation, expected) => {
    expect(pixel(100, 50, orientation)).toEqual(expected); // Exif 3.0, tag Orientation; worked by hand
  });

  it('swaps width and height for quarter turns only', () => {
    expect(uprightSize(size, 6)).toEqual({ width: 4000, height: 6000 });
    expect(uprightSize(size, 3)).toEqual(size);
  });

  it('keeps every point within the picture and every distance as it was', () => {
    const inside = fc.tuple(
      fc.double({ min: 0, max: 6000, noNaN: true }),
      fc.double({ min: 0, max: 4000, noNaN: true }),
    );
    fc.assert(
      fc.property(inside, inside, fc.constantFrom<Orientation>(1, 2, 3, 4, 5, 6, 7, 8), (a, b, orientation) => {
        const [ua, ub] = [toUpright(px(...a), size, orientation), toUpright(px(...b), size, orientation)];
        const upright = uprightSize(size, orientation);
        expect(ua.x).toBeGreaterThanOrEqual(0);
        expect(ua.x).toBeLessThanOrEqual(upright.width);
        expect(ua.y).toBeGreaterThanOrEqual(0);
        expect(ua.y).toBeLessThanOrEqual(upright.height);
        expect(Math.abs(Math.hypot(ub.x - ua.x, ub.y - ua.y) - Math.hypot(b[0] - a[0], b[1] - a[1]))).toBeLessThan(
          1e-6,
        );
      }),
    );
  });

  it('refuses a ninth', () =>
    expect(codeOf(() => toUpright(px(1, 1), size, 9 as Orientation))).toBe('not-an-orientation'));
});
