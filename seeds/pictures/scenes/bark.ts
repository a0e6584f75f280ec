/** Rough bark of a fallen trunk that lies across the picture: grain along x, plates, cracks, fibres; and its colours. */
import { bend } from '../tracer/bump.js';
import { Ground } from '../tracer/ground.js';
import type { Noise } from '../tracer/noise.js';
import type { Material } from '../tracer/scene.js';

export interface BarkShape {
  readonly left: number;
  readonly near: number;
  readonly columns: number;
  readonly rows: number;
  readonly step: number;
  /** The trunk falls away behind as a circle of this radius, mm, from y = 0 on. */
  readonly trunk: number;
  /** Factor on all heights but the trunk's; 1 is deeply furrowed. */
  readonly relief: number;
}

export function bark(noise: Noise, shape: BarkShape): Ground {
  const { left, near, columns, rows, step, trunk, relief } = shape;
  return new Ground(left, near, columns, rows, step, (x, y) => {
    const wx = x + 0.9 * noise.at(x * 0.35, y * 0.6, 7.1);
    const wy = y + 0.5 * noise.at(x * 0.3, y * 0.5, 3.7);
    const plates = noise.ridged(wx * 0.1, wy * 0.33, 1.3, 3);
    const cracks = smooth(0.6, 0.78, noise.ridged(wx * 0.16 + 9, wy * 0.5, 5.2, 2));
    const flakes = Math.abs(noise.fractal(wx * 0.42, wy * 1.9, 2.2, 4));
    const steps = Math.floor(4 * (plates + flakes * 0.3)) / 4; // scales that peel off in layers
    const fibres = noise.fractal(wx * 1.1, wy * 13, 8.8, 4);
    const crumbs = noise.fractal(x * 9, y * 11, 4.4, 3);
    const fall = y > 0 ? (y * y) / (2 * trunk) : (y * y) / (6 * trunk);
    return (
      relief * (0.8 * plates + 0.4 * steps + 0.5 * flakes - 1.0 * cracks - 0.6) + 0.15 * fibres + 0.03 * crumbs - fall
    );
  });
}

/** Brown and grey, darker in cracks, with a crust of lichen and a breath of green. */
export function barkColour(noise: Noise, lichen: number, green: number): Material {
  return (at, s) => {
    const { x, y, z } = at;
    const slow = noise.fractal(x * 0.35, y * 0.8, 11.5, 3);
    const fine = noise.fractal(x * 4, y * 16, 2.5, 3);
    const grey = smooth(-0.05, 0.35, slow + 0.5 * fine);
    const dark = 0.75 + 0.5 * fine + 0.35 * noise.at(x * 22, y * 25, 1.1);
    s.r = (0.085 + 0.045 * grey) * dark;
    s.g = (0.056 + 0.045 * grey) * dark;
    s.b = (0.036 + 0.043 * grey) * dark;
    s.gloss = 0.035;
    s.rough = 0.46;
    const crust = smooth(0.16, 0.3, noise.fractal(x * 0.42 + 4, y * 0.5, 20.3, 4) + lichen + 0.05 * fine);
    if (crust > 0) {
      const speck = 0.8 + 0.5 * noise.at(x * 14, y * 14, 3.3);
      s.r += (0.17 * speck - s.r) * crust;
      s.g += (0.2 * speck - s.g) * crust;
      s.b += (0.145 * speck - s.b) * crust;
    }
    const algae = smooth(0.05, 0.4, noise.fractal(x * 0.7, y * 0.9, 31.7, 4) + green) * 0.75;
    s.r += (0.042 - s.r) * algae;
    s.g += (0.07 - s.g) * algae;
    s.b += (0.016 - s.b) * algae;
    bend(
      s,
      at,
      0.012,
      (px, py) =>
        0.016 * noise.fractal(px * 18, py * 26, 9.1 + z * 0.1, 2) + crust * 0.014 * noise.at(px * 11, py * 11, 6.6),
    );
  };
}

export function smooth(from: number, to: number, v: number): number {
  const t = Math.max(0, Math.min(1, (v - from) / (to - from)));
  return t * t * (3 - 2 * t);
}
