/** Renders a scene pixel by pixel into two half exposures, so that their difference tells how noisy each place is. */
import { Random } from '../random.js';
import type { Scene } from './scene.js';
import { Tracer } from './trace.js';

export interface Exposure {
  readonly width: number;
  readonly height: number;
  /** Linear red, green, blue. */
  readonly halves: readonly [Float32Array, Float32Array];
}

/**
 * @param rays  per pixel and half
 * @param limit  brightest contribution of one path, so that rare glints make no sparks
 */
export function expose(scene: Scene, rays: number, seed: number, limit = 6): Exposure {
  const { width, height } = scene.camera.view;
  const random = new Random(seed);
  const tracer = new Tracer(scene, random);
  const halves = [new Float32Array(width * height * 3), new Float32Array(width * height * 3)] as const;
  const ray = new Float64Array(6);
  const one = new Float64Array(3);
  const started = Date.now();
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      for (const half of halves) {
        const turn = random.next() * 2 * Math.PI;
        for (let i = 0; i < rays; i++) {
          // The lens is covered evenly: rings and angles of a spiral, shaken.
          const r = Math.sqrt((i + random.next()) / rays);
          const a = turn + i * 2.399963 + 0.8 * random.next();
          scene.camera.ray(x + random.next(), y + random.next(), r * Math.cos(a), r * Math.sin(a), ray);
          one.fill(0);
          tracer.path(ray, one);
          const most = Math.max(one[0]!, one[1]!, one[2]!);
          if (!(most >= 0)) throw new Error(`A path at (${x}, ${y}) has no brightness.`);
          const scale = (most > limit ? limit / most : 1) / rays;
          const o = (y * width + x) * 3;
          half[o] = half[o]! + one[0]! * scale;
          half[o + 1] = half[o + 1]! + one[1]! * scale;
          half[o + 2] = half[o + 2]! + one[2]! * scale;
        }
      }
    }
    if (process.env['PROGRESS'] && y % 100 === 99)
      process.stdout.write(`row ${y + 1}: ${Math.round((Date.now() - started) / 1000)} s\n`);
  }
  return { width, height, halves };
}
