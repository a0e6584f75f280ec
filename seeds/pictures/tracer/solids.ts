/**
 * Solids of a scene, packed into flat arrays: round cones (two balls and the cone that touches both) and triangles
 * with smooth normals. Everything rounded is one of the first; everything plate-like is a mesh of the second.
 */
import { add, cross, sub, unit, vec, type Vector } from './vector.js';

export interface Hit {
  t: number;
  /** Index of the solid; -1 for none, GROUND for the height field. */
  solid: number;
  nx: number;
  ny: number;
  nz: number;
  /** Places on the solid: along a cone 0 to 1, or the triangle's interpolated chart. */
  u: number;
  v: number;
}

export const GROUND = -2;

const SIZE = 20;

export class Solids {
  /** Cone: a, b, ra, rb. Triangle: a, ab, ac, three normals, then charts apart. */
  data = new Float64Array(SIZE * 1024);
  charts = new Float64Array(6 * 1024);
  kinds = new Uint8Array(1024);
  materials = new Uint16Array(1024);
  /** One number per solid that materials may use: an age, a shade. */
  shades = new Float32Array(1024);
  count = 0;

  cone(a: Vector, b: Vector, ra: number, rb: number, material: number, shade = 0, u0 = 0, u1 = 1): void {
    const o = this.room(0, material, shade) * SIZE;
    this.data.set([a.x, a.y, a.z, b.x, b.y, b.z, ra, rb, u0, u1], o);
  }

  /** A chain of round cones through points with a radius each. */
  chain(points: readonly Vector[], radii: readonly number[], material: number, shade = 0): void {
    for (let i = 0; i + 1 < points.length; i++) {
      const n = points.length - 1;
      this.cone(points[i]!, points[i + 1]!, radii[i]!, radii[i + 1]!, material, shade, i / n, (i + 1) / n);
    }
  }

  triangle(
    p: readonly Vector[],
    n: readonly Vector[],
    chart: readonly number[],
    material: number,
    shade: number,
  ): void {
    const i = this.room(1, material, shade);
    const [a, b, c] = p as [Vector, Vector, Vector];
    const ab = sub(b, a);
    const ac = sub(c, a);
    const values = [a, ab, ac, n[0]!, n[1]!, n[2]!].flatMap(({ x, y, z }) => [x, y, z]);
    this.data.set(values, i * SIZE);
    this.charts.set(chart, i * 6);
  }

  /** A sheet from a formula over the unit square; normals follow from neighbouring points. */
  sheet(columns: number, rows: number, at: (u: number, v: number) => Vector, material: number, shade = 0): void {
    const points: Vector[] = [];
    for (let j = 0; j <= rows; j++) for (let i = 0; i <= columns; i++) points.push(at(i / columns, j / rows));
    const w = columns + 1;
    const p = (i: number, j: number): Vector =>
      points[Math.max(0, Math.min(rows, j)) * w + Math.max(0, Math.min(columns, i))]!;
    const normals = points.map((_, k) => {
      const i = k % w;
      const j = Math.floor(k / w);
      const n = cross(sub(p(i + 1, j), p(i - 1, j)), sub(p(i, j + 1), p(i, j - 1)));
      return n.x === 0 && n.y === 0 && n.z === 0 ? vec(0, 0, 1) : unit(n);
    });
    for (let j = 0; j < rows; j++) {
      for (let i = 0; i < columns; i++) {
        const q = [j * w + i, j * w + i + 1, (j + 1) * w + i + 1, (j + 1) * w + i];
        for (const [a, b, c] of [
          [q[0]!, q[1]!, q[2]!],
          [q[0]!, q[2]!, q[3]!],
        ] as const) {
          const chart = [a, b, c].flatMap((k) => [(k % w) / columns, Math.floor(k / w) / rows]);
          const three = [a, b, c];
          this.triangle(
            three.map((k) => points[k]!),
            three.map((k) => normals[k]!),
            chart,
            material,
            shade,
          );
        }
      }
    }
  }

  bounds(i: number): [number, number, number, number, number, number] {
    const o = i * SIZE;
    const d = this.data;
    const a = vec(d[o]!, d[o + 1]!, d[o + 2]!);
    if (this.kinds[i] === 0) {
      const ra = d[o + 6]!;
      const rb = d[o + 7]!;
      const b = vec(d[o + 3]!, d[o + 4]!, d[o + 5]!);
      return [
        Math.min(a.x - ra, b.x - rb),
        Math.min(a.y - ra, b.y - rb),
        Math.min(a.z - ra, b.z - rb),
        Math.max(a.x + ra, b.x + rb),
        Math.max(a.y + ra, b.y + rb),
        Math.max(a.z + ra, b.z + rb),
      ];
    }
    const b = add(a, vec(d[o + 3]!, d[o + 4]!, d[o + 5]!));
    const c = add(a, vec(d[o + 6]!, d[o + 7]!, d[o + 8]!));
    return [
      Math.min(a.x, b.x, c.x),
      Math.min(a.y, b.y, c.y),
      Math.min(a.z, b.z, c.z),
      Math.max(a.x, b.x, c.x),
      Math.max(a.y, b.y, c.y),
      Math.max(a.z, b.z, c.z),
    ];
  }

  /** Nearest hit beyond `near` and before `hit.t`; writes into `hit` and says whether there was one. */
  meet(i: number, ox: number, oy: number, oz: number, dx: number, dy: number, dz: number, hit: Hit): boolean {
    return this.kinds[i] === 0
      ? this.meetCone(i, ox, oy, oz, dx, dy, dz, hit)
      : this.meetTriangle(i, ox, oy, oz, dx, dy, dz, hit);
  }

  private meetTriangle(
    i: number,
    ox: number,
    oy: number,
    oz: number,
    dx: number,
    dy: number,
    dz: number,
    hit: Hit,
  ): boolean {
    const d = this.data;
    const o = i * SIZE;
    const ex = d[o + 3]!,
      ey = d[o + 4]!,
      ez = d[o + 5]!;
    const fx = d[o + 6]!,
      fy = d[o + 7]!,
      fz = d[o + 8]!;
    const px = dy * fz - dz * fy,
      py = dz * fx - dx * fz,
      pz = dx * fy - dy * fx;
    const det = ex * px + ey * py + ez * pz;
    if (det > -1e-14 && det < 1e-14) return false;
    const inv = 1 / det;
    const tx = ox - d[o]!,
      ty = oy - d[o + 1]!,
      tz = oz - d[o + 2]!;
    const u = (tx * px + ty * py + tz * pz) * inv;
    if (u < 0 || u > 1) return false;
    const qx = ty * ez - tz * ey,
      qy = tz * ex - tx * ez,
      qz = tx * ey - ty * ex;
    const v = (dx * qx + dy * qy + dz * qz) * inv;
    if (v < 0 || u + v > 1) return false;
    const t = (fx * qx + fy * qy + fz * qz) * inv;
    if (t < 1e-5 || t >= hit.t) return false;
    const w = 1 - u - v;
    hit.t = t;
    hit.solid = i;
    hit.nx = w * d[o + 9]! + u * d[o + 12]! + v * d[o + 15]!;
    hit.ny = w * d[o + 10]! + u * d[o + 13]! + v * d[o + 16]!;
    hit.nz = w * d[o + 11]! + u * d[o + 14]! + v * d[o + 17]!;
    const c = this.charts;
    hit.u = w * c[i * 6]! + u * c[i * 6 + 2]! + v * c[i * 6 + 4]!;
    hit.v = w * c[i * 6 + 1]! + u * c[i * 6 + 3]! + v * c[i * 6 + 5]!;
    return true;
  }

  /** @see Quílez, "Round cone intersection": the quadratic of the cone between the two tangent circles, then the balls */
  private meetCone(
    i: number,
    ox: number,
    oy: number,
    oz: number,
    dx: number,
    dy: number,
    dz: number,
    hit: Hit,
  ): boolean {
    const d = this.data;
    const o = i * SIZE;
    const ax = d[o]!,
      ay = d[o + 1]!,
      az = d[o + 2]!;
    const ra = d[o + 6]!,
      rb = d[o + 7]!;
    const bx = d[o + 3]! - ax,
      by = d[o + 4]! - ay,
      bz = d[o + 5]! - az;
    const px = ox - ax,
      py = oy - ay,
      pz = oz - az;
    const rr = ra - rb;
    const m0 = bx * bx + by * by + bz * bz;
    const m1 = bx * px + by * py + bz * pz;
    const m2 = bx * dx + by * dy + bz * dz;
    const m3 = dx * px + dy * py + dz * pz;
    const m5 = px * px + py * py + pz * pz;
    const d2 = m0 - rr * rr;
    const k2 = d2 - m2 * m2;
    const k1 = d2 * m3 - m1 * m2 + m2 * rr * ra;
    const k0 = d2 * m5 - m1 * m1 + 2 * m1 * rr * ra - m0 * ra * ra;
    let t = Infinity;
    let along = 0;
    const h = k1 * k1 - k0 * k2;
    if (h >= 0 && Math.abs(k2) > 1e-14) {
      const tc = (-Math.sqrt(h) - k1) / k2;
      const y = m1 - ra * rr + tc * m2;
      if (tc > 1e-5 && y > 0 && y < d2) {
        t = tc;
        along = y / d2;
      }
    }
    if (t === Infinity) {
      const ha = m3 * m3 - m5 + ra * ra;
      if (ha > 0) {
        const ta = -m3 - Math.sqrt(ha);
        if (ta > 1e-5 && m1 - ra * rr + ta * m2 <= 0) t = ta;
      }
      const qx = px - bx,
        qy = py - by,
        qz = pz - bz;
      const m3b = dx * qx + dy * qy + dz * qz;
      const hb = m3b * m3b - (qx * qx + qy * qy + qz * qz) + rb * rb;
      if (hb > 0) {
        const tb = -m3b - Math.sqrt(hb);
        if (tb > 1e-5 && tb < t && m1 - ra * rr + tb * m2 >= d2) {
          t = tb;
          along = 1;
        }
      }
    }
    if (t >= hit.t) return false;
    hit.t = t;
    hit.solid = i;
    // The middle of the ball that touches the surface here.
    const r = ra - rr * along;
    hit.nx = (px + t * dx - bx * along) / r;
    hit.ny = (py + t * dy - by * along) / r;
    hit.nz = (pz + t * dz - bz * along) / r;
    hit.u = d[o + 8]! + along * (d[o + 9]! - d[o + 8]!);
    hit.v = 0;
    return true;
  }

  private room(kind: 0 | 1, material: number, shade: number): number {
    if (this.count === this.kinds.length) this.grow();
    const i = this.count++;
    this.kinds[i] = kind;
    this.materials[i] = material;
    this.shades[i] = shade;
    return i;
  }

  private grow(): void {
    const more = <T extends { set(from: T): void }>(old: T, fresh: T): T => {
      fresh.set(old);
      return fresh;
    };
    const n = this.kinds.length * 2;
    this.data = more(this.data, new Float64Array(SIZE * n));
    this.charts = more(this.charts, new Float64Array(6 * n));
    this.kinds = more(this.kinds, new Uint8Array(n));
    this.materials = more(this.materials, new Uint16Array(n));
    this.shades = more(this.shades, new Float32Array(n));
  }
}
