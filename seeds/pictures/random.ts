/**
 * Seeded random numbers, so that a picture renders the same twice.
 *
 * @see Steele, Lea & Flood 2014, "Fast splittable pseudorandom number generators" (the mixing constants)
 */
export class Random {
  private state: number;

  constructor(seed: number) {
    this.state = (seed ^ 0x9e3779b9) >>> 0;
  }

  /** Uniform in [0, 1). */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.next();
  }

  /** Standard normal, by Box and Muller. */
  normal(): number {
    return Math.sqrt(-2 * Math.log(1 - this.next())) * Math.cos(2 * Math.PI * this.next());
  }

  /** Normal, drawn again until it lies within the limits. */
  normalWithin(mean: number, deviation: number, low: number, high: number): number {
    for (let i = 0; i < 200; i++) {
      const value = mean + deviation * this.normal();
      if (value >= low && value <= high) return value;
    }
    return Math.min(high, Math.max(low, mean));
  }
}
