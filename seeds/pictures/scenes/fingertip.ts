/** A fingertip, mm: pad with its ridges, a nail in its fold, creases of the skin. Its nail looks along `up`. */
import type { Noise } from '../tracer/noise.js';
import type { Solids } from '../tracer/solids.js';
import { add, cross, times, unit, type Vector } from '../tracer/vector.js';
import { smooth } from './bark.js';

export interface Finger {
  readonly tip: Vector;
  /** From the tip towards the hand. */
  readonly axis: Vector;
  readonly up: Vector;
  /** Across, where it is broadest before the first joint, mm. */
  readonly width: number;
  readonly length: number;
}

const NAIL = { from: 0.6, to: 10.6, spread: 0.78 };

export function layFinger(solids: Solids, noise: Noise, finger: Finger, skin: number, nail: number): void {
  const side = unit(cross(finger.axis, finger.up));
  const up = cross(side, finger.axis);
  const at = (along: number, around: number, out: number): Vector => {
    // around: 0 on the nail's side, ±π on the pad's
    const r = radius(finger, along);
    const pad = -0.1 * finger.width * Math.exp(-(((along - 6) / 7) ** 2)) * smooth(0.2, -1, Math.cos(around));
    const flat = Math.cos(around) > 0 ? 0.8 : 0.9;
    return add(
      add(finger.tip, times(finger.axis, along)),
      add(times(side, (r + out) * Math.sin(around)), times(up, (r + out) * flat * Math.cos(around) + pad)),
    );
  };
  solids.sheet(
    220,
    220,
    (u, v) => {
      const around = (u - 0.5) * 2 * Math.PI;
      const along = finger.length * v ** 1.5;
      return at(along, around, relief(noise, along, around));
    },
    skin,
  );
  solids.sheet(
    48,
    48,
    (u, v) => {
      const along = NAIL.from - 0.9 + (NAIL.to - NAIL.from + 0.9) * v;
      const round = Math.sqrt(Math.max(0, 1 - Math.max(0, (v - 0.72) / 0.28) ** 2));
      const around = (u - 0.5) * 2 * NAIL.spread * (0.55 + 0.45 * round) * smooth(-0.12, 0.12, v);
      const edge = Math.abs(u * 2 - 1);
      const r = 0.2 - 0.32 * edge ** 6 - 0.4 * smooth(0.9, 1, v) + 0.004 * Math.sin(u * 70);
      return at(Math.max(along, 0.75), around, r + (along < 0.75 ? (0.75 - along) * -0.35 : 0));
    },
    nail,
  );
}

function radius({ width }: Finger, along: number): number {
  const round = Math.min(1, along / 9.5);
  return (width / 2) * Math.sqrt(Math.max(0, 1 - (1 - round) ** 2.3)) * (1 + 0.05 * smooth(12, 22, along));
}

/** Folds round the nail, a crease at the joint, and slow unevenness. */
function relief(noise: Noise, along: number, around: number): number {
  const beside = Math.abs(Math.abs(around) - NAIL.spread * 1.08);
  const fold = 0.42 * Math.exp(-((beside / 0.16) ** 2)) * smooth(1, 4, along) * smooth(13, 10.5, along);
  const behind = 0.4 * Math.exp(-(((along - NAIL.to - 0.7) / 0.8) ** 2)) * smooth(1.3, 0.9, Math.abs(around));
  const bed = -0.25 * smooth(1, 0.85, Math.abs(around) / NAIL.spread) * smooth(0.5, 2, along) * smooth(11.8, 11, along);
  const joint = [20.5, 21.9, 23.1].reduce((sum, a) => {
    const wave = along - a + 0.5 * noise.at(around * 2, a, 0.5);
    return sum - 0.2 * Math.exp(-((wave / 0.22) ** 2)) * smooth(1.6, 0.8, Math.abs(around));
  }, 0);
  return fold + behind + bed + joint + 0.1 * noise.fractal(along * 0.3, Math.sin(around) * 2, Math.cos(around) * 2, 3);
}

/** Height of the skin's ridges and lines at a place of its chart, mm. */
export function skinRidges(noise: Noise, finger: Finger, u: number, v: number): number {
  const around = (u - 0.5) * 2 * Math.PI;
  const along = finger.length * v ** 1.5;
  const across = (around - Math.sign(around) * Math.PI) * finger.width * 0.45;
  const pad = smooth(1.25, 1.75, Math.abs(around)) * smooth(21, 17, along);
  const whorl = Math.hypot(across * 0.9, (along - 9) * 0.8) + 0.7 * noise.at(across * 0.25, along * 0.25, 2.2);
  const print = 0.014 * Math.sin((2 * Math.PI * whorl) / 0.48) * pad;
  const x = around * finger.width * 0.5;
  const lines = 0.06 * Math.abs(noise.fractal(x * 1.5, along * 3.4, 4.4, 3)) * (1 - pad);
  return print - lines + 0.008 * noise.at(x * 9, along * 9, 1);
}
