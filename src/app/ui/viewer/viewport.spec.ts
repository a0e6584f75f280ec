import fc from 'fast-check';
import { distance, px, viewPx } from '@shared/geometry/points';
import { Viewport } from './viewport';

const PICTURE = { width: 4000, height: 3000 };
const SIZE = { width: 800, height: 500 };

/** A picture shown at this zoom with its corner at x, y, turned by `angle`. */
function turned(zoom: number, x: number, y: number, angle = 0): Viewport {
  const [cos, sin] = [Math.cos(angle) * zoom, Math.sin(angle) * zoom];
  return Viewport.fromCorners(
    {
      origin: { x, y },
      right: { x: x + cos * PICTURE.width, y: y + sin * PICTURE.width },
      down: { x: x - sin * PICTURE.height, y: y + cos * PICTURE.height },
    },
    PICTURE,
    SIZE,
  );
}

describe('the viewport', () => {
  it('puts image pixels where the viewer says that the picture lies', () => {
    const viewport = turned(0.25, 30, -40);
    expect(viewport.toView(px(0, 0))).toEqual(viewPx(30, -40));
    expect(viewport.toView(px(400, 200))).toEqual(viewPx(130, 10));
    expect(viewport.toImage(viewPx(130, 10))).toEqual(px(400, 200));
    expect(viewport.zoom).toBeCloseTo(0.25, 12);
    expect(viewport.toImageLength(10)).toBeCloseTo(40, 10);
  });

  it('comes back to the same image point from any view, turned or not', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 40, noNaN: true }),
        fc.double({ min: -1e5, max: 1e5, noNaN: true }),
        fc.double({ min: -1e5, max: 1e5, noNaN: true }),
        fc.double({ min: -Math.PI, max: Math.PI, noNaN: true }),
        fc.double({ min: 0, max: 4000, noNaN: true }),
        fc.double({ min: 0, max: 3000, noNaN: true }),
        (zoom, x, y, angle, imageX, imageY) => {
          const viewport = turned(zoom, x, y, angle);
          const back = viewport.toImage(viewport.toView(px(imageX, imageY)));
          expect(distance(back, px(imageX, imageY))).toBeLessThan(1e-6);
        },
      ),
    );
  });

  it('stretches every distance by the zoom', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.05, max: 20, noNaN: true }),
        fc.double({ min: 0, max: 6, noNaN: true }),
        (zoom, angle) => {
          const viewport = turned(zoom, 5, 9, angle);
          const apart = distance(viewport.toView(px(100, 50)), viewport.toView(px(103, 54)));
          expect(apart / zoom).toBeCloseTo(5, 8);
        },
      ),
    );
  });

  it('knows what can be seen, and what lies in the middle', () => {
    const viewport = turned(0.5, -100, -50);
    expect(viewport.centre).toEqual(px(1000, 600));
    expect(viewport.shows(px(200, 100))).toBe(true);
    expect(viewport.shows(px(200, 100), 5)).toBe(false);
    expect(viewport.shows(px(199, 100))).toBe(false);
  });
});
