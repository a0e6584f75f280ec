/**
 * A flat-backed millipede (Polydesmidae): a head, a collum, eighteen rings with keels and three rows of bosses, and a
 * telson, that is twenty rings behind the head; two pairs of legs on each ring from the fifth to the last but one.
 */
import type { Random } from '../random.js';
import type { Noise } from '../tracer/noise.js';
import { ellipsoid } from '../tracer/ellipsoid.js';
import type { Solids } from '../tracer/solids.js';
import { add, times, unit, vec, type Vector } from '../tracer/vector.js';
import { smooth } from './bark.js';

export const RINGS = 20;
export const FLAT_BACK = { back: 0, flank: 1, leg: 2 } as const;

/** The body's middle line: where, and which way is forward, at a distance from the tail, mm. */
export interface BodyLine {
  readonly length: number;
  at(s: number): { place: Vector; forward: Vector };
}

export interface Ring {
  /** Counted from the head: 1 is the collum, 20 the telson. */
  readonly number: number;
  readonly middle: Vector;
  readonly left: Vector;
  readonly right: Vector;
  readonly width: number;
}

/** Keel to keel over the broadest, from collum to telson. */
const WIDTHS = [0.68, 0.78, 0.86, 0.92, 0.97, 1, 1, 1, 1, 1, 1, 1, 1, 0.99, 0.98, 0.96, 0.92, 0.83, 0.66, 0.26];

export function layFlatBack(
  solids: Solids,
  noise: Noise,
  random: Random,
  line: BodyLine,
  broad: number,
  ground: (x: number, y: number) => number,
): Ring[] {
  const pitch = (line.length * 0.955) / RINGS;
  const rings: Ring[] = [];
  for (let k = RINGS - 1; k >= 0; k--) {
    const end = (RINGS - 1 - k) * pitch; // the ring's hind end, from the tail
    const width = WIDTHS[k]! * broad;
    layBack(solids, noise, line, end, pitch, width, k);
    const { place, forward } = line.at(end + pitch / 2);
    const side = vec(-forward.y, forward.x, 0);
    rings.push({
      number: k + 1,
      middle: add(place, vec(0, 0, 0.3)),
      left: add(place, times(side, width / 2)),
      right: add(place, times(side, -width / 2)),
      width,
    });
    layFlank(solids, line, end, pitch, WIDTHS[k]! * broad);
    const pairs = k < 1 || k > 18 ? 0 : k < 4 ? 1 : 2;
    for (let pair = 0; pair < pairs; pair++) {
      for (const hand of [-1, 1])
        layLeg(solids, random, line, end + pitch * (0.25 + 0.45 * pair), width, hand, ground, k * 2 + pair);
    }
  }
  layFront(solids, line, pitch, broad, ground);
  return rings.reverse();
}

function layBack(
  solids: Solids,
  noise: Noise,
  line: BodyLine,
  end: number,
  pitch: number,
  width: number,
  k: number,
): void {
  const telson = k === RINGS - 1;
  const collum = k === 0;
  solids.sheet(
    84,
    30,
    (u, v) => {
      // v runs from the front edge, tucked under the ring before, to the hind edge.
      const a = Math.abs(u * 2 - 1) * 1.18;
      const hand = u < 0.5 ? -1 : 1;
      const top = Math.min(1, a);
      const under = Math.max(0, a - 1) / 0.18;
      const corner = smooth(0.36, 0, v);
      const teeth = 0.022 * Math.cos(v * 6.283 * 3) * smooth(0.85, 1, top);
      let half = (width / 2) * (1 - 0.3 * corner * corner + teeth);
      if (telson) half *= 1 - 0.86 * v ** 0.9;
      if (collum) half *= 1 - 0.22 * Math.abs(v - 0.5) ** 2 * 4;
      const across = hand * half * (top - 0.3 * under);
      const keel = smooth(0.5, 0.74, top);
      const dome = 0.42 * (width / 2.7) * (1 - (Math.min(top, 0.75) / 0.75) ** 2.1) + 0.03 * keel;
      const bosses = telson ? 0 : bossHeight(top, v) * (1 - under);
      const furrow = 0.035 * Math.exp(-((top / 0.035) ** 2));
      const lip = smooth(0.88, 1, v) * 0.05;
      const front = smooth(0.2, 0, v) * 0.09;
      const grain =
        0.014 * noise.fractal(across * 3, (end + v) * 3, k + 0.5, 2) + 0.005 * noise.at(across * 9, (end + v) * 9, k);
      const hind = (k > 16 ? 0.12 : 0.28) * smooth(0.7, 1, top) * v * v; // hind corners drawn out backwards
      const s = end + pitch * (1.06 * (1 - v) - hind);
      const { place, forward } = line.at(s);
      const side = vec(-forward.y, forward.x, 0);
      const z =
        dome + bosses - furrow - lip - front + grain - 0.085 * Math.min(1, under * 2.2) - (telson ? 0.25 * v * v : 0);
      return add(add(place, times(side, across)), vec(0, 0, z));
    },
    FLAT_BACK.back,
    k / (RINGS - 1),
  );
}

/** Three rows of pillow-like bosses, three to six a side, each row shifted against the next, with furrows between. */
export function bossHeight(top: number, v: number): number {
  if (v < 0.14) return 0;
  const rows = (v - 0.14) / 0.285;
  const row = Math.max(0, Math.min(2, Math.floor(rows + 0.06 * Math.sin(top * 9))));
  const inRow = Math.min(1, Math.max(0, rows - row));
  const column = (top ** 0.9 * [2.6, 3.7, 4.9][row]! + 0.5 * (row % 2)) % 1;
  const pillow =
    Math.sqrt(Math.max(0, 1 - Math.abs(2 * inRow - 1) ** 2.4)) * Math.sqrt(1 - Math.abs(2 * column - 1) ** 2.4);
  return BOSS * pillow;
}

export const BOSS = 0.062;

function layFlank(solids: Solids, line: BodyLine, end: number, pitch: number, width: number): void {
  const r = 0.235 * width;
  const down = vec(0, 0, -r * 0.72);
  const a = add(line.at(end + pitch * 0.15).place, down);
  const b = add(line.at(end + pitch * 0.6).place, down);
  const c = add(line.at(end + pitch * 1.05).place, down);
  solids.cone(a, b, r * 0.94, r, FLAT_BACK.flank);
  solids.cone(b, c, r, r * 0.86, FLAT_BACK.flank);
}

function layLeg(
  solids: Solids,
  random: Random,
  line: BodyLine,
  s: number,
  width: number,
  hand: number,
  ground: (x: number, y: number) => number,
  order: number,
): void {
  const { place, forward } = line.at(s);
  const side = vec(-forward.y * hand, forward.x * hand, 0);
  const swing = 0.34 * Math.sin(order * 0.85 + (hand > 0 ? 0.5 : 0)); // legs step in waves
  const at = (out: number, ahead: number, z: number): Vector =>
    add(add(place, add(times(side, out * width), times(forward, ahead))), vec(0, 0, z));
  const hip = at(0.1, 0, -0.52);
  const knee = at(0.44, swing * 0.45, -0.24);
  const shin = at(0.6, swing * 0.8, -0.42 + 0.03 * random.normal());
  const toe = at(0.76, swing, 0);
  const foot = vec(toe.x, toe.y, Math.min(shin.z - 0.1, ground(toe.x, toe.y) + 0.02));
  solids.chain([hip, knee, shin, foot], [0.085, 0.075, 0.055, 0.018], FLAT_BACK.leg, random.next());
}

function layFront(
  solids: Solids,
  line: BodyLine,
  pitch: number,
  broad: number,
  ground: (x: number, y: number) => number,
): void {
  const { place, forward } = line.at(RINGS * pitch);
  const side = vec(-forward.y, forward.x, 0);
  const head = add(place, add(times(forward, 0.2), vec(0, 0, -0.22)));
  const tall = unit(add(vec(0, 0, 1), times(forward, 0.45)));
  const long = unit(add(forward, vec(0, 0, -0.45)));
  ellipsoid(solids, head, [times(side, broad * 0.25), times(long, 0.42), times(tall, 0.42)], FLAT_BACK.back, -1);
  for (const hand of [-1, 1]) {
    let p = add(head, add(times(side, hand * broad * 0.14), add(times(forward, 0.3), vec(0, 0, 0.18))));
    let d = unit(add(add(times(forward, 0.75), times(side, hand * 0.6)), vec(0, 0, 0.35)));
    const joints = [p];
    for (const length of [0.12, 0.3, 0.36, 0.3, 0.32, 0.34, 0.1]) {
      p = add(p, times(d, length));
      if (p.z < ground(p.x, p.y) + 0.08) p = vec(p.x, p.y, ground(p.x, p.y) + 0.08);
      joints.push(p);
      d = unit(add(d, add(times(forward, 0.1), vec(0, 0, -0.2))));
    }
    for (let i = 0; i + 1 < joints.length; i++) {
      const thick = [0.07, 0.066, 0.07, 0.072, 0.08, 0.098, 0.05][i]!;
      solids.cone(joints[i]!, joints[i + 1]!, thick * 0.72, thick, FLAT_BACK.leg, 0.5);
    }
  }
}
