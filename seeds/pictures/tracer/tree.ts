/** A tree of boxes over the solids, so that a ray only tries the few that it may hit. */
import type { Hit, Solids } from './solids.js';

const LEAF = 4;

export class Tree {
  private readonly boxes: Float64Array;
  private readonly first: Int32Array;
  private readonly sizes: Int32Array;
  private readonly order: Int32Array;
  private nodes = 0;
  private readonly stack = new Int32Array(96);

  constructor(private readonly solids: Solids) {
    const n = Math.max(1, solids.count);
    this.boxes = new Float64Array(12 * n + 12);
    this.first = new Int32Array(2 * n + 2);
    this.sizes = new Int32Array(2 * n + 2);
    this.order = Int32Array.from({ length: solids.count }, (_, i) => i);
    const bounds = new Float64Array(6 * n);
    for (let i = 0; i < solids.count; i++) bounds.set(solids.bounds(i), i * 6);
    if (solids.count > 0) this.build(bounds, 0, solids.count);
  }

  /** Splits at the middle of the longest side of the boxes' middles; the left child follows its parent. */
  private build(bounds: Float64Array, from: number, to: number): number {
    const node = this.nodes++;
    const box = [Infinity, Infinity, Infinity, -Infinity, -Infinity, -Infinity];
    const mid = [Infinity, Infinity, Infinity, -Infinity, -Infinity, -Infinity];
    for (let k = from; k < to; k++) {
      const o = this.order[k]! * 6;
      for (let a = 0; a < 3; a++) {
        box[a] = Math.min(box[a]!, bounds[o + a]!);
        box[a + 3] = Math.max(box[a + 3]!, bounds[o + a + 3]!);
        const m = bounds[o + a]! + bounds[o + a + 3]!;
        mid[a] = Math.min(mid[a]!, m);
        mid[a + 3] = Math.max(mid[a + 3]!, m);
      }
    }
    this.boxes.set(box, node * 6);
    let axis = 0;
    for (let a = 1; a < 3; a++) if (mid[a + 3]! - mid[a]! > mid[axis + 3]! - mid[axis]!) axis = a;
    if (to - from <= LEAF || mid[axis + 3]! - mid[axis]! < 1e-12) {
      this.first[node] = from;
      this.sizes[node] = to - from;
      return node;
    }
    const split = (mid[axis]! + mid[axis + 3]!) / 2;
    let cut = from;
    for (let k = from; k < to; k++) {
      const o = this.order[k]! * 6;
      if (bounds[o + axis]! + bounds[o + axis + 3]! < split) {
        const t = this.order[cut]!;
        this.order[cut++] = this.order[k]!;
        this.order[k] = t;
      }
    }
    if (cut === from || cut === to) cut = (from + to) >> 1;
    this.build(bounds, from, cut);
    this.first[node] = this.build(bounds, cut, to);
    this.sizes[node] = 0;
    return node;
  }

  /** Nearest solid before `hit.t`; with `any`, stops at the first it finds. */
  meet(ox: number, oy: number, oz: number, dx: number, dy: number, dz: number, hit: Hit, any: boolean): boolean {
    if (this.nodes === 0) return false;
    const { boxes, stack, solids } = this;
    const ix = 1 / dx;
    const iy = 1 / dy;
    const iz = 1 / dz;
    let found = false;
    let depth = 0;
    stack[depth++] = 0;
    while (depth > 0) {
      const node = stack[--depth]!;
      const o = node * 6;
      const x0 = (boxes[o]! - ox) * ix;
      const x1 = (boxes[o + 3]! - ox) * ix;
      const y0 = (boxes[o + 1]! - oy) * iy;
      const y1 = (boxes[o + 4]! - oy) * iy;
      const z0 = (boxes[o + 2]! - oz) * iz;
      const z1 = (boxes[o + 5]! - oz) * iz;
      const near = Math.max(x0 < x1 ? x0 : x1, y0 < y1 ? y0 : y1, z0 < z1 ? z0 : z1);
      const far = Math.min(x0 < x1 ? x1 : x0, y0 < y1 ? y1 : y0, z0 < z1 ? z1 : z0);
      if (near > far || far < 0 || near > hit.t) continue;
      const size = this.sizes[node]!;
      if (size === 0) {
        const right = this.first[node]!;
        const left = node + 1;
        // The child whose middle is nearer along the ray goes on top of the stack.
        const l = left * 6;
        const r = right * 6;
        const side =
          (boxes[l]! + boxes[l + 3]! - boxes[r]! - boxes[r + 3]!) * dx +
          (boxes[l + 1]! + boxes[l + 4]! - boxes[r + 1]! - boxes[r + 4]!) * dy +
          (boxes[l + 2]! + boxes[l + 5]! - boxes[r + 2]! - boxes[r + 5]!) * dz;
        stack[depth++] = side < 0 ? right : left;
        stack[depth++] = side < 0 ? left : right;
        continue;
      }
      const from = this.first[node]!;
      for (let k = from; k < from + size; k++) {
        if (solids.meet(this.order[k]!, ox, oy, oz, dx, dy, dz, hit)) {
          found = true;
          if (any) return true;
        }
      }
    }
    return found;
  }
}
