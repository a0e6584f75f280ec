/**
 * Discrete Fourier transform of a square complex image, in place; its side is a power of two.
 * The inverse is divided by the number of pixels, so that there and back changes nothing.
 */
export class SquareFft {
  private readonly cos: Float64Array;
  private readonly sin: Float64Array;
  private readonly reversed: Uint32Array;
  private readonly re: Float64Array;
  private readonly im: Float64Array;

  constructor(readonly side: number) {
    const bits = Math.log2(side);
    if (!Number.isInteger(bits)) throw new Error(`A side of ${side} px is not a power of two.`);
    this.cos = Float64Array.from({ length: side / 2 }, (_, i) => Math.cos((2 * Math.PI * i) / side));
    this.sin = Float64Array.from({ length: side / 2 }, (_, i) => Math.sin((2 * Math.PI * i) / side));
    this.reversed = new Uint32Array(side);
    for (let i = 0; i < side; i++) {
      let r = 0;
      for (let b = 0; b < bits; b++) if (i & (1 << b)) r |= 1 << (bits - 1 - b);
      this.reversed[i] = r;
    }
    this.re = new Float64Array(side);
    this.im = new Float64Array(side);
  }

  /** From image to spectrum (direction -1) or back (direction 1). */
  transform(re: Float32Array, im: Float32Array, direction: -1 | 1): void {
    const { side } = this;
    const scale = direction === 1 ? 1 / (side * side) : 1;
    for (let pass = 0; pass < 2; pass++) {
      for (let y = 0; y < side; y++) {
        const row = y * side;
        for (let x = 0; x < side; x++) {
          const from = row + this.reversed[x]!;
          this.re[x] = re[from]!;
          this.im[x] = im[from]!;
        }
        this.line(direction);
        const s = pass === 1 ? scale : 1;
        for (let x = 0; x < side; x++) {
          re[row + x] = this.re[x]! * s;
          im[row + x] = this.im[x]! * s;
        }
      }
      transpose(re, side);
      transpose(im, side);
    }
  }

  private line(direction: -1 | 1): void {
    const { side, re, im, cos, sin } = this;
    for (let half = 1; half < side; half *= 2) {
      const step = side / (2 * half);
      for (let k = 0; k < half; k++) {
        const wr = cos[k * step]!;
        const wi = direction * sin[k * step]!;
        for (let i = k; i < side; i += 2 * half) {
          const j = i + half;
          const xr = re[j]! * wr - im[j]! * wi;
          const xi = re[j]! * wi + im[j]! * wr;
          re[j] = re[i]! - xr;
          im[j] = im[i]! - xi;
          re[i] = re[i]! + xr;
          im[i] = im[i]! + xi;
        }
      }
    }
  }
}

function transpose(image: Float32Array, side: number): void {
  const block = 32; // small enough that both blocks stay in the cache
  for (let by = 0; by < side; by += block) {
    for (let bx = by; bx < side; bx += block) {
      for (let y = by; y < by + block; y++) {
        for (let x = Math.max(bx, y + 1); x < bx + block; x++) {
          const a = y * side + x;
          const b = x * side + y;
          const t = image[a]!;
          image[a] = image[b]!;
          image[b] = t;
        }
      }
    }
  }
}
