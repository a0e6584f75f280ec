/** Small things in every mount that nobody asked for: dust on the slide, specks, a hair, an air bubble's rim. */
import type { Random } from '../random.js';
import type { Specimen } from './specimen.js';

/** Irregular specks; each is a few overlapping blots. */
export function laySpecks(specimen: Specimen, random: Random, count: number, largestUm: number): void {
  for (let n = 0; n < count; n++) {
    const x = random.next() * specimen.side;
    const y = random.next() * specimen.side;
    const layer = specimen.layers[Math.floor(random.next() * specimen.layers.length)]!;
    const size = largestUm * (0.12 + 0.88 * random.next() ** 4);
    const dark = random.between(0.05, 0.9);
    for (let blot = 0; blot < 4; blot++) {
      const r = size * random.between(0.3, 0.6);
      const bx = x + (size * random.normal() * 0.4) / specimen.umPerPx;
      const by = y + (size * random.normal() * 0.4) / specimen.umPerPx;
      specimen.around(bx, by, 2 * r, (i, dx, dy) => {
        const bump = Math.exp(-(((dx * dx + dy * dy) / (r * r)) ** 2));
        layer.soot[i] = layer.soot[i]! + bump * dark * 0.5;
        layer.path[i] = layer.path[i]! + bump * 0.05;
      });
    }
  }
}

/** A slow unevenness of the medium, as a sum of broad soft mounds. */
export function layMottle(specimen: Specimen, random: Random, count: number, pathUm: number): void {
  const layer = specimen.nearest(0);
  for (let n = 0; n < count; n++) {
    const r = random.between(0.5, 3.5);
    const strength = pathUm * random.normal();
    specimen.around(random.next() * specimen.side, random.next() * specimen.side, 2.2 * r, (i, dx, dy) => {
      layer.path[i] = layer.path[i]! + strength * Math.exp(-(dx * dx + dy * dy) / (r * r));
    });
  }
}
