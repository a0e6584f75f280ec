/**
 * Smooth noise in three dimensions, about -1 to 1, that repeats for a seed.
 *
 * @see Perlin 2002, "Improving noise"
 */
import { Random } from '../random.js';

export class Noise {
  private readonly order = new Uint8Array(512);

  constructor(seed: number) {
    const random = new Random(seed);
    const first = Array.from({ length: 256 }, (_, i) => i);
    for (let i = 255; i > 0; i--) {
      const j = Math.floor(random.next() * (i + 1));
      [first[i], first[j]] = [first[j]!, first[i]!];
    }
    for (let i = 0; i < 512; i++) this.order[i] = first[i & 255]!;
  }

  at(x: number, y: number, z: number): number {
    const p = this.order;
    const fx = Math.floor(x);
    const fy = Math.floor(y);
    const fz = Math.floor(z);
    const X = fx & 255;
    const Y = fy & 255;
    const Z = fz & 255;
    const dx = x - fx;
    const dy = y - fy;
    const dz = z - fz;
    const u = fade(dx);
    const v = fade(dy);
    const w = fade(dz);
    const A = p[X]! + Y;
    const B = p[X + 1]! + Y;
    const aa = p[A]! + Z;
    const ab = p[A + 1]! + Z;
    const ba = p[B]! + Z;
    const bb = p[B + 1]! + Z;
    const x1 = lerp(u, slope(p[aa]!, dx, dy, dz), slope(p[ba]!, dx - 1, dy, dz));
    const x2 = lerp(u, slope(p[ab]!, dx, dy - 1, dz), slope(p[bb]!, dx - 1, dy - 1, dz));
    const x3 = lerp(u, slope(p[aa + 1]!, dx, dy, dz - 1), slope(p[ba + 1]!, dx - 1, dy, dz - 1));
    const x4 = lerp(u, slope(p[ab + 1]!, dx, dy - 1, dz - 1), slope(p[bb + 1]!, dx - 1, dy - 1, dz - 1));
    return lerp(w, lerp(v, x1, x2), lerp(v, x3, x4));
  }

  /** Octaves of noise, each twice as fine and half as strong. */
  fractal(x: number, y: number, z: number, octaves: number): number {
    let sum = 0;
    let strength = 0.5;
    let scale = 1;
    for (let i = 0; i < octaves; i++) {
      sum += strength * this.at(x * scale, y * scale, z * scale);
      strength *= 0.5;
      scale *= 2.03;
    }
    return sum;
  }

  /** Sharp crests, 0 to about 1. */
  ridged(x: number, y: number, z: number, octaves: number): number {
    let sum = 0;
    let strength = 0.5;
    let scale = 1;
    for (let i = 0; i < octaves; i++) {
      const crest = 1 - Math.abs(this.at(x * scale, y * scale, z * scale)) * 1.6;
      sum += strength * crest * crest;
      strength *= 0.5;
      scale *= 2.1;
    }
    return sum;
  }
}

const fade = (t: number): number => t * t * t * (t * (t * 6 - 15) + 10);
const lerp = (t: number, a: number, b: number): number => a + t * (b - a);

function slope(hash: number, x: number, y: number, z: number): number {
  const h = hash & 15;
  const u = h < 8 ? x : y;
  const v = h < 4 ? y : h === 12 || h === 14 ? x : z;
  return ((h & 1) === 0 ? u : -u) + ((h & 2) === 0 ? v : -v);
}
