/** A spore, laid into a specimen as the light path through its wall, its contents, and its ornament. */
import { Random } from '../random.js';
import type { Specimen } from './specimen.js';

export interface Spore {
  /** Middle, grid px. */
  readonly x: number;
  readonly y: number;
  /** Over the plane in focus, µm. */
  readonly height: number;
  /** True axes without ornament, µm. */
  readonly length: number;
  readonly width: number;
  /** Of the long axis, degrees. */
  readonly angle: number;
  readonly seed: number;
}

export interface SporeLook {
  /**
   * How far outside the wall the picture's edge (half as dark as the wall) falls, µm: warts and the lens's own blur
   * carry it outwards. The body is laid that much smaller, so that a spore's axes are those that a careful eye sees.
   */
  readonly edgeLead: number;
  readonly wall: { readonly thickness: number; readonly index: number; readonly pigment: number };
  /** Index is the difference to the mounting medium; pigment is absorbance per µm. */
  readonly contents: { readonly index: number; readonly pigment: number; readonly grain: number };
  readonly warts?: {
    readonly spacing: number;
    readonly radius: number;
    readonly path: number;
    readonly pigment: number;
  };
  readonly drops?: { readonly most: number; readonly index: number };
  /** The small peg by which a basidiospore was attached. */
  readonly apiculus?: { readonly length: number; readonly radius: number };
}

export function laySpore(specimen: Specimen, seen: Spore, look: SporeLook): void {
  const spore = { ...seen, length: seen.length - 2 * look.edgeLead, width: seen.width - 2 * look.edgeLead };
  const random = new Random(spore.seed);
  layBody(specimen, spore, look);
  if (look.warts) layWarts(specimen, spore, look.warts, random);
  if (look.drops) layDrops(specimen, spore, look.drops, random);
  if (look.apiculus) layApiculus(specimen, spore, look, look.apiculus);
  layGrain(specimen, spore, look, random);
}

/** Turns an offset in the picture into the spore's own frame. */
function turned(angle: number): (dx: number, dy: number) => { u: number; v: number } {
  const c = Math.cos((angle * Math.PI) / 180);
  const s = Math.sin((angle * Math.PI) / 180);
  return (dx, dy) => ({ u: dx * c + dy * s, v: -dx * s + dy * c });
}

function layBody(specimen: Specimen, spore: Spore, { wall, contents }: SporeLook): void {
  const a = spore.length / 2;
  const b = spore.width / 2;
  const toSpore = turned(spore.angle);
  const shares = specimen.share(spore.height);
  const soft = specimen.umPerPx * 0.5; // the outline is averaged over one pixel
  specimen.around(spore.x, spore.y, a + 0.5, (i, dx, dy) => {
    const { u, v } = toSpore(dx, dy);
    const outside = chord(u, v, a, b, soft);
    if (outside === 0) return;
    const inside = chord(u, v, a - wall.thickness, b - wall.thickness, soft);
    const shell = outside - inside;
    for (const { layer, part } of shares) {
      layer.path[i] = layer.path[i]! + part * (shell * wall.index + inside * contents.index);
      layer.pigment[i] = layer.pigment[i]! + part * (shell * wall.pigment + inside * contents.pigment);
    }
  });
}

/** Length of the line of sight inside an ellipsoid of revolution about its long axis, µm. */
function chord(u: number, v: number, a: number, b: number, soft: number): number {
  if (a <= 0 || b <= 0) return 0;
  let sum = 0;
  for (const [du, dv] of SUBPIXELS) {
    const rest = 1 - ((u + du * soft) / a) ** 2 - ((v + dv * soft) / b) ** 2;
    if (rest > 0) sum += 2 * b * Math.sqrt(rest);
  }
  return sum / SUBPIXELS.length;
}

const SUBPIXELS = [
  [-0.5, -0.5],
  [0.5, -0.5],
  [-0.5, 0.5],
  [0.5, 0.5],
] as const;

/** Warts on a ball: spread by a turning spiral, shaken a little; those on top and below lie in other layers. */
function layWarts(specimen: Specimen, spore: Spore, warts: NonNullable<SporeLook['warts']>, random: Random): void {
  const radius = spore.width / 2;
  const count = Math.round((4 * Math.PI * radius * radius) / (warts.spacing * warts.spacing));
  const golden = Math.PI * (3 - Math.sqrt(5));
  const tilt = random.between(0, 2 * Math.PI);
  const roll = random.between(0, Math.PI);
  for (let n = 0; n < count; n++) {
    const z0 = 1 - (2 * (n + 0.5)) / count + 0.35 * (warts.spacing / radius) * random.between(-0.5, 0.5);
    const ring = Math.sqrt(Math.max(0, 1 - z0 * z0));
    const turn = n * golden + 0.4 * (warts.spacing / radius) * random.normal();
    const x1 = ring * Math.cos(turn);
    const y1 = ring * Math.sin(turn);
    const y2 = y1 * Math.cos(roll) - z0 * Math.sin(roll);
    const z2 = y1 * Math.sin(roll) + z0 * Math.cos(roll);
    const along = x1 * Math.cos(tilt) - y2 * Math.sin(tilt);
    const across = x1 * Math.sin(tilt) + y2 * Math.cos(tilt);
    const size = warts.radius * random.between(0.75, 1.3);
    const x = spore.x + (along * (spore.length / 2 + 0.15 * size)) / specimen.umPerPx;
    const y = spore.y + (across * (radius + 0.15 * size)) / specimen.umPerPx;
    const shares = specimen.share(spore.height + z2 * radius);
    specimen.around(x, y, 3 * size, (i, dx, dy) => {
      const bump = Math.exp(-(dx * dx + dy * dy) / (size * size));
      for (const { layer, part } of shares) {
        layer.path[i] = layer.path[i]! + part * bump * warts.path;
        layer.pigment[i] = layer.pigment[i]! + part * bump * warts.pigment;
      }
    });
  }
}

function layDrops(specimen: Specimen, spore: Spore, drops: NonNullable<SporeLook['drops']>, random: Random): void {
  const count = 1 + Math.floor(random.next() * drops.most);
  const c = Math.cos((spore.angle * Math.PI) / 180);
  const s = Math.sin((spore.angle * Math.PI) / 180);
  for (let n = 0; n < count; n++) {
    const largest = count === 1 ? 0.3 : 0.2;
    const size = spore.width * random.between(0.07, largest);
    const along = spore.length * (count === 1 ? random.between(-0.08, 0.08) : random.between(-0.3, 0.3));
    const across = spore.width * random.between(-0.14, 0.14);
    const x = spore.x + (along * c - across * s) / specimen.umPerPx;
    const y = spore.y + (along * s + across * c) / specimen.umPerPx;
    const shares = specimen.share(spore.height + random.between(-1, 1));
    specimen.around(x, y, size, (i, dx, dy) => {
      const thickness = chord(dx, dy, size, size, specimen.umPerPx * 0.5);
      for (const { layer, part } of shares) layer.path[i] = layer.path[i]! + part * thickness * drops.index;
    });
  }
}

function layApiculus(
  specimen: Specimen,
  spore: Spore,
  { wall }: SporeLook,
  apiculus: NonNullable<SporeLook['apiculus']>,
): void {
  const toSpore = turned(spore.angle);
  const tip = spore.length / 2;
  specimen.around(spore.x, spore.y, tip + apiculus.length + 0.5, (i, dx, dy) => {
    const { u, v } = toSpore(dx, dy);
    const along = u - (tip - 0.35);
    if (along < 0 || along > apiculus.length + 0.35) return;
    const side = v - spore.width * 0.1;
    const radius = apiculus.radius * (1.25 - 0.5 * (along / apiculus.length));
    const rest = radius * radius - side * side;
    if (rest <= 0) return;
    for (const { layer, part } of specimen.share(spore.height)) {
      layer.path[i] = layer.path[i]! + part * 2 * Math.sqrt(rest) * wall.index;
      layer.pigment[i] = layer.pigment[i]! + part * 2 * Math.sqrt(rest) * wall.pigment;
    }
  });
}

/** Cloudy contents: many faint specks, never over the outline. */
function layGrain(specimen: Specimen, spore: Spore, { contents, wall }: SporeLook, random: Random): void {
  const count = Math.round(spore.length * spore.width * 1.6);
  const c = Math.cos((spore.angle * Math.PI) / 180);
  const s = Math.sin((spore.angle * Math.PI) / 180);
  for (let n = 0; n < count; n++) {
    const size = random.between(0.15, 0.55);
    const r = Math.sqrt(random.next()) * (1 - (wall.thickness + size) / (spore.width / 2));
    const turn = random.between(0, 2 * Math.PI);
    const along = r * (spore.length / 2) * Math.cos(turn);
    const across = r * (spore.width / 2) * Math.sin(turn);
    const x = spore.x + (along * c - across * s) / specimen.umPerPx;
    const y = spore.y + (along * s + across * c) / specimen.umPerPx;
    const strength = contents.grain * random.normal();
    const shares = specimen.share(spore.height + random.between(-0.3, 0.3) * spore.width);
    specimen.around(x, y, 2.5 * size, (i, dx, dy) => {
      const bump = strength * Math.exp(-(dx * dx + dy * dy) / (size * size));
      for (const { layer, part } of shares) layer.path[i] = layer.path[i]! + part * bump;
    });
  }
}
