/**
 * One fruiting body of *Hemitrichia clavata*: a stalk, and a club-shaped head, closed or burst into golden wool.
 *
 * @see Macbride 1922, The North American Slime-Moulds, pp. 264–265: clavate, shining, yellow; total height 2–3 mm
 */
import type { Random } from '../random.js';
import type { Noise } from '../tracer/noise.js';
import type { Solids } from '../tracer/solids.js';
import { add, aside, cross, mix, times, unit, vec, type Vector } from '../tracer/vector.js';

export interface Head {
  readonly base: Vector;
  readonly tip: Vector;
  /** From base to tip, mm. */
  readonly height: number;
  /** Broadest, mm. */
  readonly width: number;
  readonly burst: boolean;
}

export const HEAD_MATERIALS = { stalk: 0, wall: 1, wool: 2, cup: 3 } as const;

export function layHead(solids: Solids, noise: Noise, random: Random, head: Head, shade: number): void {
  const axis = unit(vec(head.tip.x - head.base.x, head.tip.y - head.base.y, head.tip.z - head.base.z));
  const [side, other] = aside(axis);
  const part = random.between(0.3, 0.42); // of the height that is stalk
  const bow = times(side, head.height * random.between(-0.05, 0.05));
  const along = (t: number): Vector =>
    add(mix(head.base, head.tip, t), times(bow, Math.sin(Math.PI * Math.min(1, t / part)) * (t < part ? 1 : 0)));
  layStalk(solids, random, head, along, part);
  const wide = head.width / 2;
  const seed = random.between(0, 50);
  const broad = random.between(0.58, 0.7);
  const foot = random.between(0.17, 0.26);
  const open = head.burst ? 0.5 : 1;
  solids.sheet(
    head.burst ? 64 : 56,
    40,
    (u, v) => {
      const ragged = head.burst
        ? open * (1 + 0.16 * noise.at(Math.cos(6.283 * u) * 3, Math.sin(6.283 * u) * 3, seed))
        : 1;
      const t = v * ragged;
      const round = 2 * Math.PI * u;
      const c = Math.cos(round);
      const s = Math.sin(round);
      const dents = 0.11 * noise.fractal(c * 0.9 + seed, s * 0.9, t * 1.6, 3);
      const wrinkles = 0.02 * noise.at(c * 4 + seed, s * 4, t * 4) * Math.sin(Math.PI * t);
      const r = wide * profile(t, foot, broad) * (1 + dents + wrinkles) * (head.burst ? 1 + 0.12 * t : 1);
      const up = mix(along(part), head.tip, t);
      return add(up, add(times(side, r * c), times(other, r * s)));
    },
    head.burst ? HEAD_MATERIALS.cup : HEAD_MATERIALS.wall,
    shade,
  );
  if (head.burst) layWool(solids, random, mix(along(part), head.tip, 0.42), axis, wide, head.height * (1 - part));
}

/** Radius along the head, base 0 to tip 1, as a part of the broadest. */
function profile(t: number, foot: number, broad: number): number {
  if (t < broad) return foot + (1 - foot) * Math.sin((t / broad) * (Math.PI / 2)) ** 1.15;
  return Math.sqrt(Math.max(0, 1 - ((t - broad) / (1 - broad)) ** 2));
}

function layStalk(solids: Solids, random: Random, head: Head, along: (t: number) => Vector, part: number): void {
  const thick = head.width * 0.075;
  const steps = 9;
  const points = Array.from({ length: steps + 1 }, (_, i) => along((part * 1.04 * i) / steps));
  const radii = points.map((_, i) => {
    const t = i / steps;
    return thick * (1 + 1.6 * Math.exp(-t * 9) + 0.25 * t + 0.08 * random.normal());
  });
  solids.chain(points, radii, HEAD_MATERIALS.stalk, random.next());
}

/** Capillitium set free: a cloud of thin looping threads that swells out of the cup. */
function layWool(solids: Solids, random: Random, middle: Vector, axis: Vector, wide: number, tall: number): void {
  const [side, other] = aside(axis);
  for (let n = 0; n < 900; n++) {
    const r = Math.cbrt(random.next());
    const z = random.between(-1, 1);
    const a = random.between(0, 6.283);
    const ring = Math.sqrt(1 - z * z);
    let p = add(
      middle,
      add(
        times(axis, tall * (0.22 + 0.46 * z * r)),
        add(times(side, wide * 1.12 * ring * r * Math.cos(a)), times(other, wide * 1.12 * ring * r * Math.sin(a))),
      ),
    );
    let d = unit(vec(random.normal(), random.normal(), random.normal() + 0.3));
    let curl = unit(vec(random.normal(), random.normal(), random.normal()));
    const points = [p];
    for (let k = 0; k < 6; k++) {
      d = unit(add(d, times(cross(d, curl), 0.55)));
      curl = unit(add(curl, times(vec(random.normal(), random.normal(), random.normal()), 0.3)));
      p = add(p, times(d, 0.07));
      points.push(p);
    }
    solids.chain(
      points,
      points.map(() => 0.0036),
      HEAD_MATERIALS.wool,
      random.next(),
    );
  }
}
