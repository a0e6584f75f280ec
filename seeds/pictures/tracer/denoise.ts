/**
 * Smooths what is noise and leaves what is picture: each pixel becomes a mean of near pixels whose surroundings look
 * alike. Each half exposure is weighed by the other, so that noise cannot vouch for itself.
 *
 * @see Rousselle, Knaus & Zwicker 2012, "Adaptive rendering with non-local means filtering"
 */
import type { Exposure } from './expose.js';

const REACH = 5;
const PATCH = 2;

/** @param strength  how unlike surroundings may be; 0.5 to 1 */
export function denoise({ width, height, halves }: Exposure, strength: number): Float32Array {
  const size = width * height;
  const [a, b] = halves.map((half) => half.map(compress)) as [Float32Array, Float32Array];
  const variance = noise(a, b, width, height);
  const sums = [new Float32Array(size * 3), new Float32Array(size * 3)];
  const weights = [new Float32Array(size), new Float32Array(size)];
  const unlike = new Float32Array(size);
  for (let dy = -REACH; dy <= REACH; dy++) {
    for (let dx = -REACH; dx <= REACH; dx++) {
      if (dx * dx + dy * dy > REACH * REACH + 2) continue;
      [b, a].forEach((guide, h) => {
        const source = h === 0 ? a : b;
        compare(guide, variance, width, height, dx, dy, strength, unlike);
        boxBlur(unlike, width, height, PATCH);
        gather(source, unlike, width, height, dx, dy, sums[h]!, weights[h]!);
      });
    }
  }
  const out = new Float32Array(size * 3);
  for (let i = 0; i < size; i++) {
    for (let c = 0; c < 3; c++) {
      const k = i * 3 + c;
      out[k] = expand(0.5 * (sums[0]![k]! / weights[0]![i]! + sums[1]![k]! / weights[1]![i]!));
    }
  }
  return out;
}

/** Brightness on a scale on which noise is about even. */
const compress = (v: number): number => Math.sqrt(Math.max(0, v) + 0.002);
const expand = (v: number): number => Math.max(0, v * v - 0.002);

function noise(a: Float32Array, b: Float32Array, width: number, height: number): Float32Array {
  const variance = new Float32Array(width * height);
  for (let i = 0; i < variance.length; i++) {
    let sum = 0;
    for (let c = 0; c < 3; c++) sum += (a[i * 3 + c]! - b[i * 3 + c]!) ** 2;
    variance[i] = sum / 2 / 3;
  }
  boxBlur(variance, width, height, 4);
  return variance;
}

function compare(
  guide: Float32Array,
  variance: Float32Array,
  width: number,
  height: number,
  dx: number,
  dy: number,
  strength: number,
  out: Float32Array,
): void {
  const k2 = strength * strength;
  for (let y = 0; y < height; y++) {
    const qy = Math.max(0, Math.min(height - 1, y + dy));
    for (let x = 0; x < width; x++) {
      const qx = Math.max(0, Math.min(width - 1, x + dx));
      const p = y * width + x;
      const q = qy * width + qx;
      const vp = variance[p]!;
      const vq = variance[q]!;
      const both = vp + Math.min(vp, vq);
      let sum = 0;
      for (let c = 0; c < 3; c++) sum += (guide[p * 3 + c]! - guide[q * 3 + c]!) ** 2;
      out[p] = (sum / 3 - both) / (1e-6 + k2 * (vp + vq));
    }
  }
}

function gather(
  source: Float32Array,
  unlike: Float32Array,
  width: number,
  height: number,
  dx: number,
  dy: number,
  sums: Float32Array,
  weights: Float32Array,
): void {
  for (let y = Math.max(0, -dy); y < Math.min(height, height - dy); y++) {
    for (let x = Math.max(0, -dx); x < Math.min(width, width - dx); x++) {
      const p = y * width + x;
      const w = Math.exp(-Math.max(0, unlike[p]!));
      if (w < 0.01) continue;
      const q = (y + dy) * width + x + dx;
      sums[p * 3] = sums[p * 3]! + w * source[q * 3]!;
      sums[p * 3 + 1] = sums[p * 3 + 1]! + w * source[q * 3 + 1]!;
      sums[p * 3 + 2] = sums[p * 3 + 2]! + w * source[q * 3 + 2]!;
      weights[p] = weights[p]! + w;
    }
  }
}

/** Mean over a square of (2r + 1)², in place. */
function boxBlur(image: Float32Array, width: number, height: number, r: number): void {
  const line = new Float32Array(Math.max(width, height));
  const pass = (start: number, step: number, n: number): void => {
    let sum = 0;
    for (let i = -r; i <= r; i++) sum += image[start + Math.max(0, Math.min(n - 1, i)) * step]!;
    for (let i = 0; i < n; i++) {
      line[i] = sum / (2 * r + 1);
      sum += image[start + Math.min(n - 1, i + r + 1) * step]! - image[start + Math.max(0, i - r) * step]!;
    }
    for (let i = 0; i < n; i++) image[start + i * step] = line[i]!;
  };
  for (let y = 0; y < height; y++) pass(y * width, 1, width);
  for (let x = 0; x < width; x++) pass(x, width, height);
}
