/** From linear light to a photograph: glow, falling corners, a film-like curve, grain. */
import { Random } from '../random.js';

export interface Development {
  readonly exposure: number;
  /** 1 is neutral; above, colours grow stronger. */
  readonly saturation: number;
  readonly grain: number;
  readonly vignette: number;
  /** Share of bright light that the lens scatters round itself. */
  readonly glow: number;
  readonly seed: number;
}

export function develop(light: Float32Array, width: number, height: number, how: Development): Uint8Array {
  const random = new Random(how.seed);
  const halo = how.glow > 0 ? haloOf(light, width, height) : null;
  const grain = soften(
    Float32Array.from({ length: width * height }, () => random.normal()),
    width,
    height,
  );
  const out = new Uint8Array(width * height * 3);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const i = y * width + x;
      const d2 = ((x / width - 0.5) ** 2 + (y / height - 0.5) ** 2 * (height / width) ** 2) * 4;
      const gain = how.exposure * (1 - how.vignette * d2);
      const rgb = [0, 1, 2].map((c) => {
        const v = light[i * 3 + c]!;
        return gain * (halo ? v * (1 - how.glow) + halo[i * 3 + c]! * how.glow : v);
      });
      const grey = 0.25 * rgb[0]! + 0.65 * rgb[1]! + 0.1 * rgb[2]!;
      for (let c = 0; c < 3; c++) {
        const v = film(Math.max(0, grey + (rgb[c]! - grey) * how.saturation));
        const n = how.grain * (0.35 + 1.3 * Math.sqrt(Math.max(0, v * (1 - v)))) * (grain[i]! + 0.35 * random.normal());
        out[i * 3 + c] = Math.max(0, Math.min(255, Math.round(255 * (v + n))));
      }
    }
  }
  return out;
}

/** Toe and shoulder of a film print, then the screen's own curve. @see Hable 2010, "Filmic tonemapping" */
function film(v: number): number {
  const curve = (x: number): number => (x * (0.22 * x + 0.03) + 0.002) / (x * (0.22 * x + 0.3) + 0.06) - 0.0333;
  const linear = Math.max(0, Math.min(1, curve(v * 1.7) / curve(9)));
  return linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
}

/** Grain clumps over a little more than a pixel. */
function soften(grain: Float32Array, width: number, height: number): Float32Array {
  const out = new Float32Array(grain.length);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const at = (dx: number, dy: number): number =>
        grain[((y + dy + height) % height) * width + ((x + dx + width) % width)]!;
      out[y * width + x] = 0.72 * at(0, 0) + 0.36 * (at(1, 0) + at(0, 1)) + 0.2 * at(1, 1);
    }
  }
  return out;
}

/** A wide blur of the picture: three box passes, at half the sharpness of a hundredth of its width. */
function haloOf(light: Float32Array, width: number, height: number): Float32Array {
  let from = light.map((v) => Math.min(v, 4));
  const r = Math.round(width / 90);
  for (let pass = 0; pass < 3; pass++) {
    for (const [step, n, lines, jump] of [
      [3, width, height, width * 3],
      [width * 3, height, width, 3],
    ] as const) {
      const to = new Float32Array(from.length);
      for (let l = 0; l < lines; l++) {
        for (let c = 0; c < 3; c++) {
          const start = l * jump + c;
          let sum = 0;
          for (let i = -r; i <= r; i++) sum += from[start + Math.max(0, Math.min(n - 1, i)) * step]!;
          for (let i = 0; i < n; i++) {
            to[start + i * step] = sum / (2 * r + 1);
            sum += from[start + Math.min(n - 1, i + r + 1) * step]! - from[start + Math.max(0, i - r) * step]!;
          }
        }
      }
      from = to;
    }
  }
  return from;
}
