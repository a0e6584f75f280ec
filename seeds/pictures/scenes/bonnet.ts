/**
 * A very small bonnet mushroom, *Mycena acicula*: orange cap, pale margin with the gills showing through, thin stem.
 *
 * @see Atkinson 1903, Studies of American Fungi, p. 97: cap 2–4 mm broad
 */
import type { Noise } from '../tracer/noise.js';
import type { Solids } from '../tracer/solids.js';
import { add, aside, times, unit, vec, type Vector } from '../tracer/vector.js';

export interface Bonnet {
  readonly foot: Vector;
  /** Middle of the cap's rim. */
  readonly rim: Vector;
  readonly axis: Vector;
  /** Of the cap, mm. */
  readonly width: number;
}

export function layBonnet(
  solids: Solids,
  noise: Noise,
  bonnet: Bonnet,
  materials: { cap: number; gill: number; stem: number },
): void {
  const [side, other] = aside(unit(bonnet.axis));
  const axis = unit(bonnet.axis);
  const r0 = bonnet.width / 2;
  const on = (r: number, round: number, up: number): Vector =>
    add(bonnet.rim, add(times(axis, up), add(times(side, r * Math.cos(round)), times(other, r * Math.sin(round)))));
  const tall = bonnet.width * 0.46;
  const profile = (v: number): { r: number; up: number } => ({
    r: r0 * Math.sin((v * Math.PI) / 2) ** 0.9,
    up: tall * Math.cos((v * Math.PI) / 2) ** 0.85,
  });
  const gills = 22;
  solids.sheet(
    176,
    44,
    (u, v) => {
      const round = 2 * Math.PI * u;
      const { r, up } = profile(Math.max(0.002, v));
      const stripes = 0.018 * r0 * Math.cos(gills * round) * v ** 3;
      const wave = 0.03 * r0 * noise.at(Math.cos(round) * 1.4, Math.sin(round) * 1.4, 3) * v ** 2;
      return on(r + stripes + wave, round, up + stripes * 0.5 - wave);
    },
    materials.cap,
  );
  for (let g = 0; g < gills; g++) {
    const round = (2 * Math.PI * (g + 0.5)) / gills;
    solids.sheet(
      10,
      4,
      (u, v) => {
        const { r, up } = profile(0.12 + 0.86 * u);
        const depth = 0.3 * r0 * Math.sin(Math.PI * Math.min(1, 0.08 + u * 0.9)) + 0.04 * r0;
        return on(r * 0.97, round, up - 0.03 * r0 - depth * v);
      },
      materials.gill,
    );
  }
  const top = on(0, 0, tall * 0.85);
  const steps = 14;
  const bow = vec(0.5, 0.2, 0);
  const points = Array.from({ length: steps + 1 }, (_, i) => {
    const t = i / steps;
    const straight = add(times(bonnet.foot, 1 - t), times(top, t));
    return add(straight, times(bow, Math.sin(Math.PI * t) * 0.8));
  });
  solids.chain(
    points,
    points.map((_, i) => 0.2 + 0.1 * Math.exp(-i / 2)),
    materials.stem,
  );
}
