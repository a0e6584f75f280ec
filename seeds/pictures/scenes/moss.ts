/** Moss shoots: a stem with pointed leaves in a spiral, each a small curved blade. */
import type { Random } from '../random.js';
import type { Solids } from '../tracer/solids.js';
import { add, aside, cross, times, unit, vec, type Vector } from '../tracer/vector.js';

export function layMoss(solids: Solids, random: Random, base: Vector, tall: number, material: number): void {
  let p = base;
  let d = unit(vec(random.normal() * 0.3, random.normal() * 0.3, 1));
  const step = 0.09;
  const stem = [p];
  const whorls = Math.round(tall / step);
  for (let k = 0; k < whorls; k++) {
    d = unit(add(d, vec(0.06 * random.normal(), 0.06 * random.normal(), 0.02)));
    p = add(p, times(d, step));
    stem.push(p);
    const [side, other] = aside(d);
    const turn = k * 2.4 + random.next() * 0.4;
    const out = add(times(side, Math.cos(turn)), times(other, Math.sin(turn)));
    const size = (k > whorls - 4 ? 0.6 : 1) * random.between(0.5, 0.75);
    layLeaf(solids, p, d, out, size, material, random.next());
  }
  solids.chain(
    stem,
    stem.map(() => 0.035),
    material,
    0.1,
  );
}

function layLeaf(
  solids: Solids,
  at: Vector,
  up: Vector,
  out: Vector,
  size: number,
  material: number,
  shade: number,
): void {
  const across = cross(up, out);
  solids.sheet(
    4,
    7,
    (u, v) => {
      const half = 0.17 * size * Math.sin(Math.PI * Math.min(1, 0.12 + v * 0.88)) ** 0.8 * (1 - 0.55 * v);
      const w = (u - 0.5) * 2 * half;
      const lift = size * (0.75 * v - 0.35 * v * v);
      const reach = size * (0.35 * v + 0.45 * v * v);
      const keel = 0.5 * Math.abs(w);
      return add(at, add(times(up, lift + keel * 0.4), add(times(out, reach - keel * 0.3), times(across, w))));
    },
    material,
    shade,
  );
}
