/** The ground of a scene: heights on a grid, with coarse blocks whose highest point lets rays skip what they fly over. */
import { GROUND, type Hit } from './solids.js';

const BLOCK = 16;

export class Ground {
  readonly heights: Float32Array;
  private readonly tops: Float32Array;
  private readonly blocks: { x: number; y: number };
  readonly top: number;

  /**
   * @param left, near  of the grid's corner, mm
   * @param step  between grid points, mm
   */
  constructor(
    readonly left: number,
    readonly near: number,
    readonly columns: number,
    readonly rows: number,
    readonly step: number,
    height: (x: number, y: number) => number,
  ) {
    this.heights = new Float32Array(columns * rows);
    for (let j = 0; j < rows; j++) {
      for (let i = 0; i < columns; i++) this.heights[j * columns + i] = height(left + i * step, near + j * step);
    }
    this.blocks = { x: Math.ceil(columns / BLOCK), y: Math.ceil(rows / BLOCK) };
    this.tops = new Float32Array(this.blocks.x * this.blocks.y).fill(-1e9);
    for (let j = 0; j < rows; j++) {
      for (let i = 0; i < columns; i++) {
        const h = this.heights[j * columns + i]!;
        // Points on a border count for the block before, too.
        for (const bj of j % BLOCK === 0 && j > 0 ? [j / BLOCK, j / BLOCK - 1] : [Math.floor(j / BLOCK)]) {
          for (const bi of i % BLOCK === 0 && i > 0 ? [i / BLOCK, i / BLOCK - 1] : [Math.floor(i / BLOCK)]) {
            const b = bj * this.blocks.x + bi;
            if (h > this.tops[b]!) this.tops[b] = h;
          }
        }
      }
    }
    this.top = this.tops.reduce((a, b) => Math.max(a, b), -1e9);
  }

  heightAt(x: number, y: number): number {
    const gx = Math.max(0, Math.min(this.columns - 1.001, (x - this.left) / this.step));
    const gy = Math.max(0, Math.min(this.rows - 1.001, (y - this.near) / this.step));
    const i = Math.floor(gx);
    const j = Math.floor(gy);
    const u = gx - i;
    const v = gy - j;
    const o = j * this.columns + i;
    const h = this.heights;
    return (
      (h[o]! * (1 - u) + h[o + 1]! * u) * (1 - v) + (h[o + this.columns]! * (1 - u) + h[o + this.columns + 1]! * u) * v
    );
  }

  meet(ox: number, oy: number, oz: number, dx: number, dy: number, dz: number, hit: Hit): boolean {
    const size = BLOCK * this.step;
    const right = this.left + (this.columns - 1) * this.step;
    const far = this.near + (this.rows - 1) * this.step;
    let t0 = 1e-4;
    let t1 = hit.t;
    if (dx !== 0) {
      const a = (this.left - ox) / dx;
      const b = (right - ox) / dx;
      t0 = Math.max(t0, Math.min(a, b));
      t1 = Math.min(t1, Math.max(a, b));
    }
    if (dy !== 0) {
      const a = (this.near - oy) / dy;
      const b = (far - oy) / dy;
      t0 = Math.max(t0, Math.min(a, b));
      t1 = Math.min(t1, Math.max(a, b));
    }
    if (dz < 0) t0 = Math.max(t0, (this.top + 1e-6 - oz) / dz);
    else if (dz > 0) t1 = Math.min(t1, (this.top + 1e-6 - oz) / dz);
    if (t0 >= t1) return false;
    let t = t0;
    while (t < t1) {
      const x = ox + (t + 1e-6) * dx;
      const y = oy + (t + 1e-6) * dy;
      const bi = Math.max(0, Math.min(this.blocks.x - 1, Math.floor((x - this.left) / size)));
      const bj = Math.max(0, Math.min(this.blocks.y - 1, Math.floor((y - this.near) / size)));
      const tx = dx === 0 ? Infinity : (this.left + (bi + (dx > 0 ? 1 : 0)) * size - ox) / dx;
      const ty = dy === 0 ? Infinity : (this.near + (bj + (dy > 0 ? 1 : 0)) * size - oy) / dy;
      let end = Math.min(tx, ty, t1);
      if (end <= t) end = t + 1e-4;
      const low = Math.min(oz + t * dz, oz + end * dz);
      if (low <= this.tops[bj * this.blocks.x + bi]! && this.march(ox, oy, oz, dx, dy, dz, t, end, hit)) return true;
      t = end;
    }
    return false;
  }

  private march(
    ox: number,
    oy: number,
    oz: number,
    dx: number,
    dy: number,
    dz: number,
    from: number,
    to: number,
    hit: Hit,
  ): boolean {
    const flat = Math.sqrt(dx * dx + dy * dy);
    const pace = this.step / Math.max(flat, 0.3);
    let t = from;
    let above = oz + t * dz - this.heightAt(ox + t * dx, oy + t * dy);
    while (t < to) {
      const next = Math.min(to, t + pace);
      const gap = oz + next * dz - this.heightAt(ox + next * dx, oy + next * dy);
      if (gap < 0) {
        if (above < 0) return false; // already below: the start of a ray that left the ground
        const at = t + ((next - t) * above) / (above - gap);
        hit.t = at;
        hit.solid = GROUND;
        this.normal(ox + at * dx, oy + at * dy, hit);
        return true;
      }
      above = gap;
      t = next;
    }
    return false;
  }

  private normal(x: number, y: number, hit: Hit): void {
    const s = this.step;
    const gx = (this.heightAt(x + s, y) - this.heightAt(x - s, y)) / (2 * s);
    const gy = (this.heightAt(x, y + s) - this.heightAt(x, y - s)) / (2 * s);
    const n = 1 / Math.sqrt(1 + gx * gx + gy * gy);
    hit.nx = -gx * n;
    hit.ny = -gy * n;
    hit.nz = n;
  }
}
