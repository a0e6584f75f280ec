/** Ochre heads of *Hemitrichia clavata* on a wet, mossy trunk: late light from behind on the left, a low macro lens. */
import { writeJpeg } from '../encode.js';
import { Random } from '../random.js';
import { bend } from '../tracer/bump.js';
import { Camera } from '../tracer/camera.js';
import { denoise } from '../tracer/denoise.js';
import { develop } from '../tracer/develop.js';
import { expose } from '../tracer/expose.js';
import { Noise } from '../tracer/noise.js';
import type { Material, Scene } from '../tracer/scene.js';
import { Solids } from '../tracer/solids.js';
import { add, length, sub, unit, vec, type Vector } from '../tracer/vector.js';
import { writeTruth, type TrueBody } from '../truth.js';
import { bark, barkColour, smooth } from './bark.js';
import { layHead, type Head } from './head.js';
import { layMoss } from './moss.js';
import { FIELD_CAMERA } from './field-camera.js';

const SEED = 1922;
const MOSS = 4;

export async function renderHeadsOnBark(rays = 14, width = 1600): Promise<void> {
  const height = Math.round(width / 1.5);
  const noise = new Noise(SEED);
  const random = new Random(SEED);
  const ground = bark(noise, { left: -16, near: -9, columns: 1600, rows: 1250, step: 0.02, trunk: 26, relief: 1 });
  const solids = new Solids();
  const camera = new Camera({
    from: vec(0.4, -45, 14.5),
    at: vec(0.15, -0.35, 1.5),
    fieldWidth: 11.2,
    width,
    height,
    aperture: 0.78,
  });
  const heads = plant(random, (x, y) => ground.heightAt(x, y));
  heads.forEach((head) => layHead(solids, noise, random, head, random.next()));
  for (let i = 0; i < 34; i++) {
    const left = i < 20;
    const x = left ? random.normalWithin(-6.2, 1.5, -9, -3.4) : random.normalWithin(6.6, 1.2, 4.2, 9);
    const y = left ? random.between(2.4, 6) : random.between(3.4, 7);
    layMoss(solids, random, vec(x, y, ground.heightAt(x, y) - 0.1), random.between(0.9, 2.1), MOSS);
  }
  for (let i = 0; i < 5; i++) {
    const x = random.between(-5.4, -3.9);
    const y = random.between(-4.4, -3.2);
    layMoss(solids, random, vec(x, y, ground.heightAt(x, y) - 0.1), random.between(0.5, 0.9), MOSS);
  }
  const scene: Scene = {
    solids,
    ground,
    camera,
    materials: materials(noise),
    groundMaterial: barkColour(noise, -0.02, -0.02),
    lights: [{ ...unit(vec(-0.62, 0.42, 0.72)), spread: 0.16, r: 4.6, g: 4.0, b: 3.05 }],
    sky: (x, y, z, out) => {
      // Leaf canopy above, an opening to the right front, dusk between trunks at the horizon.
      const up = Math.max(0, z);
      const front = Math.max(0, 0.75 * x - 0.5 * y + 0.35 * z);
      const leaves = y > 0.3 && z < 0.6 ? smooth(0.0, 0.42, noise.fractal((x / y) * 22, (z / y) * 26, 40.5, 2)) : 0;
      out[0] = 0.02 + 0.34 * up + 0.5 * front ** 3 + 0.12 * leaves;
      out[1] = 0.026 + 0.42 * up + 0.52 * front ** 3 + 0.17 * leaves;
      out[2] = 0.018 + 0.5 * up + 0.54 * front ** 3 + 0.05 * leaves;
    },
  };
  const light = denoise(expose(scene, rays, SEED), 0.75);
  const pixels = develop(light, width, height, {
    exposure: 1.4,
    saturation: 1.05,
    grain: 0.01,
    vignette: 0.22,
    glow: 0.05,
    seed: SEED,
  });
  await writeJpeg('heads-on-bark.jpg', pixels, width, height, { ...FIELD_CAMERA, taken: '2025:11:03 10:42:00' });
  await writeTruth('heads-on-bark.jpg', {
    width,
    height,
    umPerPxX: camera.umPerPx,
    umPerPxY: camera.umPerPx,
    scaleHolds: 'plane-in-focus',
    taxon: 'Hemitrichia clavata',
    published: [
      {
        character: 'total height',
        minUm: 2000,
        maxUm: 3000,
        source: 'Macbride T.H. 1922, The North American Slime-Moulds, new and revised ed., p. 265',
      },
    ],
    preparation: 'In the field, on bark, macro lens',
    seed: SEED,
    bodies: headBodies(heads, camera),
  });
}

/** Heads in loose clumps, most near the plane in focus; none grows through another. */
function plant(random: Random, ground: (x: number, y: number) => number): Head[] {
  const clumps = [
    { x: -1.9, y: -0.1, n: 8, burst: 0.13 },
    { x: 1.2, y: -0.2, n: 7, burst: 0.15 },
    { x: 3.6, y: 0.9, n: 6, burst: 0 },
    { x: -4.2, y: 1.6, n: 5, burst: 0.2 },
    { x: 0.1, y: 2.6, n: 5, burst: 0 },
    { x: 2.9, y: -2.3, n: 2, burst: 0 },
  ];
  const heads: Head[] = [];
  for (const clump of clumps) {
    for (let made = 0, tries = 0; made < clump.n && tries < 400; tries++) {
      const x = clump.x + 0.62 * random.normal();
      const y = clump.y + 0.55 * random.normal();
      const height = random.normalWithin(2.4, 0.22, 2.05, 2.95);
      const width = height * random.between(0.29, 0.36);
      const base = vec(x, y, ground(x, y) - 0.04);
      const away = vec((x - clump.x) * 0.2 + 0.13 * random.normal(), (y - clump.y) * 0.1 + 0.07 * random.normal(), 1);
      const tip = add(base, scaled(unit(away), height));
      const near = heads.some((h) => closest(h, { base, tip }) < (h.width + width) * 0.46);
      if (near) continue;
      heads.push({ base, tip, height, width, burst: random.next() < clump.burst });
      made++;
    }
  }
  return heads;
}

const scaled = (v: Vector, s: number): Vector => vec(v.x * s, v.y * s, v.z * s);

/** Least distance of two heads, at a few places along their upper halves. */
function closest(a: { base: Vector; tip: Vector }, b: { base: Vector; tip: Vector }): number {
  let least = Infinity;
  const at = (h: { base: Vector; tip: Vector }, t: number): Vector => add(h.base, scaled(sub(h.tip, h.base), t));
  for (const s of [0.5, 0.65, 0.8, 0.95])
    for (const t of [0.5, 0.65, 0.8, 0.95]) least = Math.min(least, length(sub(at(a, s), at(b, t))));
  return least;
}

function materials(noise: Noise): Material[] {
  const stalk: Material = (at, s) => {
    const f = 0.7 + 0.6 * noise.at(at.x * 20, at.y * 20, at.z * 5) + 0.5 * at.u;
    s.r = 0.13 * f + 0.12 * at.u ** 3;
    s.g = 0.05 * f + 0.055 * at.u ** 3;
    s.b = 0.022 * f;
    s.gloss = 0.035;
    s.rough = 0.42;
    s.through = 0.15;
    bend(s, at, 0.006, (x, y, z) => 0.007 * noise.at(x * 45, y * 45, z * 7));
  };
  const wall: Material = (at, s) => {
    const ripe = 0.75 * at.shade + 0.3 * noise.at(at.x * 3, at.y * 3, at.z * 3);
    const speck =
      1 + 0.16 * noise.at(at.x * 34, at.y * 34, at.z * 34) + 0.1 * noise.at(at.x * 90, at.y * 90, at.z * 90);
    const foot = smooth(0.42, 0, at.v);
    s.r = (0.76 - 0.36 * ripe) * speck * (1 - 0.35 * foot);
    s.g = (0.47 - 0.27 * ripe) * speck * (1 - 0.55 * foot);
    s.b = (0.08 - 0.03 * ripe) * speck * (1 - 0.4 * foot);
    s.gloss = 0.06;
    s.rough = 0.27 + 0.12 * noise.at(at.x * 6, at.y * 6, at.z * 6);
    s.through = 0.3;
    bend(
      s,
      at,
      0.004,
      (x, y, z) => 0.0055 * noise.at(x * 38, y * 38, z * 38) + 0.0018 * noise.at(x * 110, y * 110, z * 110),
    );
  };
  const wool: Material = (at, s) => {
    const f = 0.75 + 0.5 * at.shade;
    s.r = 0.86 * f;
    s.g = 0.55 * f;
    s.b = 0.09 * f;
    s.through = 0.7;
  };
  const cup: Material = (at, s) => {
    wall(at, s);
    s.r *= 0.85;
    s.through = 0.5;
  };
  const moss: Material = (at, s) => {
    const f = 0.65 + 0.7 * at.shade;
    s.r = 0.075 * f;
    s.g = 0.12 * f;
    s.b = 0.022 * f;
    s.gloss = 0.03;
    s.rough = 0.4;
    s.through = 0.6;
  };
  return [stalk, wall, wool, cup, moss];
}

function headBodies(heads: readonly Head[], camera: Camera): TrueBody[] {
  return heads.map((head, i) => {
    const base = camera.project(head.base);
    const tip = camera.project(head.tip);
    const middle = camera.project(add(head.base, scaled(sub(head.tip, head.base), 0.775)));
    const cut = [base, tip].some((p) => p.x < 0 || p.y < 0 || p.x > camera.view.width || p.y > camera.view.height);
    return {
      id: `h${i + 1}`,
      kind: 'head',
      center: { x: middle.x, y: middle.y },
      axesUm: { length: head.height * 1000, width: head.width * 1000 },
      seenLengthUm: Math.hypot(base.x - tip.x, base.y - tip.y) * camera.umPerPx,
      angle: (Math.atan2(base.y - tip.y, base.x - tip.x) * 180) / Math.PI,
      focus: middle.before * 1000,
      ...(cut ? { cut } : {}),
      edgeRule: head.burst
        ? 'before it burst: base of the stalk to tip; wool swells over it'
        : 'base of the stalk to tip; broadest place of the wall',
      points: { base: { x: base.x, y: base.y }, tip: { x: tip.x, y: tip.y } },
    };
  });
}
