/** A thread with spiral bands, laid into a specimen as a hollow tube with ridges on its near and far side. */
import type { Specimen } from './specimen.js';

export interface Elater {
  /** Middle line, grid px, closely spaced; height in µm over the plane in focus. */
  readonly path: readonly { readonly x: number; readonly y: number; readonly height: number }[];
  /** Without the bands, µm. */
  readonly width: number;
  /** Bands side by side, and the length of one full turn of each, µm; hand is 1 or -1. */
  readonly bands: number;
  readonly pitch: number;
  readonly hand: 1 | -1;
  /** Length of each pointed end, µm. */
  readonly tip: number;
}

const WALL = { thickness: 0.55, index: 0.035 };
const BAND = { path: 0.15, height: 0.35 };

export function layElater(specimen: Specimen, elater: Elater): void {
  const { side, umPerPx } = specimen;
  const reach = Math.ceil((elater.width / 2 + 1) / umPerPx);
  // For each pixel near the thread: the nearest place on its middle line.
  const nearest = new Map<number, { distance: number; offset: number; along: number; height: number }>();
  let along = 0;
  for (let i = 1; i < elater.path.length; i++) {
    const a = elater.path[i - 1]!;
    const b = elater.path[i]!;
    const length = Math.hypot(b.x - a.x, b.y - a.y);
    const ux = (b.x - a.x) / length;
    const uy = (b.y - a.y) / length;
    for (let y = Math.max(0, Math.floor(b.y - reach)); y <= Math.min(side - 1, b.y + reach); y++) {
      for (let x = Math.max(0, Math.floor(b.x - reach)); x <= Math.min(side - 1, b.x + reach); x++) {
        const dx = x + 0.5 - a.x;
        const dy = y + 0.5 - a.y;
        const t = Math.max(0, Math.min(length, dx * ux + dy * uy));
        const distance = Math.hypot(dx - t * ux, dy - t * uy);
        if (distance > reach) continue;
        const key = y * side + x;
        const known = nearest.get(key);
        if (known && known.distance <= distance) continue;
        nearest.set(key, { distance, offset: dx * -uy + dy * ux, along: along + t, height: b.height });
      }
    }
    along += length;
  }
  const total = along * umPerPx;
  for (const [key, spot] of nearest) layPixel(specimen, elater, key, spot, total);
}

function layPixel(
  specimen: Specimen,
  elater: Elater,
  key: number,
  spot: { distance: number; offset: number; along: number; height: number },
  total: number,
): void {
  const s = spot.along * specimen.umPerPx;
  const end = Math.min(s, total - s);
  const radius = (elater.width / 2) * Math.min(1, Math.sqrt(end / elater.tip) * 0.94 + 0.06);
  const d = spot.distance * specimen.umPerPx;
  if (d > radius + 0.8) return;
  const sine = Math.max(-1, Math.min(1, (spot.offset < 0 ? -d : d) / radius));
  const around = Math.asin(sine);
  const turn = (elater.hand * 2 * Math.PI * s) / (elater.pitch / elater.bands);
  const near = ridge(elater.bands * around + turn);
  const far = ridge(elater.bands * (Math.PI - around) + turn);
  // At the limb the bands stand out over the wall.
  const limb = radius + BAND.height * Math.min(1, radius) * Math.max(near, far) * Math.abs(sine);
  const outside = 2 * half(limb, d);
  if (outside === 0) return;
  const shell = outside - 2 * half(radius - WALL.thickness, d);
  const lift = radius * Math.sqrt(1 - sine * sine);
  const slant = Math.min(2.6, 1 / Math.max(0.3, Math.cos(around)));
  lay(specimen, key, spot.height, shell * WALL.index);
  lay(specimen, key, spot.height + lift, near * BAND.path * slant);
  lay(specimen, key, spot.height - lift, far * BAND.path * slant * 0.55); // flattened where it lies on the slide
}

function lay(specimen: Specimen, key: number, height: number, path: number): void {
  for (const { layer, part } of specimen.share(height)) {
    layer.path[key] = layer.path[key]! + part * path;
    layer.pigment[key] = layer.pigment[key]! + part * path * 0.3;
  }
}

function half(radius: number, d: number): number {
  return d < radius ? Math.sqrt(radius * radius - d * d) : 0;
}

/** Profile of the bands: narrow ridges with broader furrows. */
function ridge(phase: number): number {
  const c = 0.5 + 0.5 * Math.cos(phase);
  return c ** 5;
}
