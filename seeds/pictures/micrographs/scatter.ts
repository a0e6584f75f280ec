/** Places spores as they settle in a mount: many alone, many leaning on a neighbour, few in another depth. */
import type { Random } from '../random.js';
import type { Spore } from './spore.js';

export interface Settling {
  readonly count: number;
  /** Share of spores that settle against one that lies there already. */
  readonly sociable: number;
  /** Share of spores that float off the plane in focus, and how far, µm. */
  readonly afloat: number;
  readonly floatHeights: readonly number[];
  /** Shake of the height of those that have settled, µm. */
  readonly unevenness: number;
  /** Part of the grid that is settled, px. */
  readonly area: { readonly left: number; readonly top: number; readonly width: number; readonly height: number };
  readonly umPerPx: number;
  readonly size: (random: Random) => { length: number; width: number };
}

export interface Settled extends Spore {
  readonly touching: number[];
}

export function settle(random: Random, settling: Settling): Settled[] {
  const { area, umPerPx } = settling;
  const spores: Settled[] = [];
  for (let tries = 0; spores.length < settling.count && tries < settling.count * 60; tries++) {
    const floats = random.next() < settling.afloat;
    const height = floats
      ? settling.floatHeights[Math.floor(random.next() * settling.floatHeights.length)]!
      : settling.unevenness * random.normal();
    const shape = { ...settling.size(random), angle: random.between(0, 360), height };
    const seed = Math.floor(random.next() * 1e9);
    let x = area.left + random.next() * area.width;
    let y = area.top + random.next() * area.height;
    const host =
      spores.length > 0 && !floats && random.next() < settling.sociable
        ? spores[Math.floor(random.next() * spores.length)]
        : undefined;
    if (host && Math.abs(host.height) < 1) {
      const turn = random.between(0, 2 * Math.PI);
      // Comes from afar until it touches.
      for (let reach = (host.length + shape.length) / 2 / umPerPx; ; reach -= 0.1) {
        x = host.x + reach * Math.cos(turn);
        y = host.y + reach * Math.sin(turn);
        if (gap({ ...shape, x, y, seed }, host, umPerPx) < 0.02) break;
      }
      if (x < area.left || y < area.top || x > area.left + area.width || y > area.top + area.height) continue;
    }
    const spore: Settled = { ...shape, x, y, seed, touching: [] };
    const near = spores.map((other) => gap(spore, other, umPerPx));
    if (near.some((g, i) => g < -0.02 && !(floats && g > -shape.width * 0.5 && spores[i]!.height !== height))) continue;
    const index = spores.push(spore) - 1;
    near.forEach((g, i) => {
      if (g < 0.12) {
        spore.touching.push(i);
        spores[i]!.touching.push(index);
      }
    });
  }
  return spores;
}

/** From the middle to the outline in a direction, µm. */
function radiusTowards(spore: { length: number; width: number; angle: number }, direction: number): number {
  const t = direction - (spore.angle * Math.PI) / 180;
  const a = spore.length / 2;
  const b = spore.width / 2;
  return (a * b) / Math.hypot(b * Math.cos(t), a * Math.sin(t));
}

/**
 * Clear distance of two outlines, µm, at a few dozen places of the first; negative when they overlap. Far apart, the
 * distance along the line of their middles will do.
 */
function gap(a: Spore, b: Spore, umPerPx: number): number {
  const turn = Math.atan2(b.y - a.y, b.x - a.x);
  const apart = Math.hypot(b.x - a.x, b.y - a.y) * umPerPx;
  if (apart > a.length / 2 + b.length / 2 + 1) return apart - a.length / 2 - b.length / 2;
  let least = Infinity;
  for (let k = -24; k <= 24; k++) {
    const t = turn + (k / 24) * (Math.PI / 2);
    const r = radiusTowards(a, t);
    const x = (a.x - b.x) * umPerPx + r * Math.cos(t);
    const y = (a.y - b.y) * umPerPx + r * Math.sin(t);
    least = Math.min(least, Math.hypot(x, y) - radiusTowards(b, Math.atan2(y, x)));
  }
  return least;
}
