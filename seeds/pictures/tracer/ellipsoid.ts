import type { Solids } from './solids.js';
import { add, times, unit, vec, type Vector } from './vector.js';

/** A closed bag of triangles: a ball squeezed and turned, its surface moved in or out by `relief` (mm). */
export function ellipsoid(
  solids: Solids,
  centre: Vector,
  axes: readonly [Vector, Vector, Vector],
  material: number,
  shade: number,
  relief: (on: Vector) => number = () => 0,
  fine = 24,
): void {
  solids.sheet(
    fine * 2,
    fine,
    (u, v) => {
      const polar = Math.PI * Math.min(0.9995, Math.max(0.0005, 1 - v));
      const round = 2 * Math.PI * u;
      const on = vec(Math.sin(polar) * Math.cos(round), Math.sin(polar) * Math.sin(round), Math.cos(polar));
      const out = add(add(times(axes[0], on.x), times(axes[1], on.y)), times(axes[2], on.z));
      return add(centre, add(out, times(unit(out), relief(on))));
    },
    material,
    shade,
  );
}
