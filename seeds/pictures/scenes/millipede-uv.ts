/**
 * A flat-backed millipede on bark at night under an ultraviolet torch. The light itself is dark violet; what glows
 * does so by fluorescence: teal cuticle, red chlorophyll in moss, bluish lint, a dull rust of fungus in the bark.
 * In this scene a surface's colour stands for what it sends back under that torch, own glow included.
 */
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
import { add, times, unit, vec, type Vector } from '../tracer/vector.js';
import { writeTruth, type TrueBody } from '../truth.js';
import { bark, smooth } from './bark.js';
import { FIELD_CAMERA } from './field-camera.js';
import { BOSS, bossHeight, layFlatBack, type BodyLine, type Ring } from './flat-back.js';
import { layMoss } from './moss.js';

const SEED = 365;
const LENGTH = 16.8;
const BROAD = 2.55;
const MOSS = 3;
const LINT = 4;

export async function renderMillipedeUv(rays = 14, width = 1600): Promise<void> {
  const height = Math.round(width / 1.5);
  const noise = new Noise(SEED);
  const random = new Random(SEED);
  const ground = bark(noise, { left: -16, near: -15, columns: 1280, rows: 1360, step: 0.025, trunk: 90, relief: 0.55 });
  const camera = new Camera({
    from: vec(4, -33, 36),
    at: vec(0.1, -0.4, 0.9),
    fieldWidth: 17.6,
    width,
    height,
    aperture: 0.95,
  });
  const solids = new Solids();
  const line = bodyLine((x, y) => ground.heightAt(x, y));
  const rings = layFlatBack(solids, noise, random, line, BROAD, (x, y) => ground.heightAt(x, y));
  for (let i = 0; i < 46; i++) {
    const far = i < 34;
    const x = far ? random.normalWithin(4.5, 2.6, -2, 11) : random.normalWithin(-6.5, 1.2, -9, -3);
    const y = far ? random.normalWithin(7.6, 1.4, 4.6, 12) : random.normalWithin(-5.8, 1, -9, -4);
    layMoss(solids, random, vec(x, y, ground.heightAt(x, y) - 0.1), random.between(0.6, 1.5), MOSS);
  }
  layLint(solids, random, (x, y) => ground.heightAt(x, y));
  const scene: Scene = {
    solids,
    ground,
    camera,
    materials: materials(noise),
    groundMaterial: barkUnderTorch(noise),
    lights: [
      { ...unit(vec(-0.62, 0.3, 0.8)), spread: 0.1, r: 2.2, g: 2.2, b: 2.2 },
      { ...unit(vec(0.8, 0.6, 0.55)), spread: 0.3, r: 0.2, g: 0.2, b: 0.24 },
    ],
    sky: (_x, _y, z, out) => {
      const up = 0.022 + 0.06 * Math.max(0, z);
      out[0] = up;
      out[1] = up;
      out[2] = up * 1.2;
    },
  };
  const light = denoise(expose(scene, rays, SEED), 0.75);
  const pixels = develop(light, width, height, {
    exposure: 1.5,
    saturation: 1.12,
    grain: 0.016,
    vignette: 0.4,
    glow: 0.1,
    seed: SEED,
  });
  await writeJpeg('millipede-uv.jpg', pixels, width, height, {
    ...FIELD_CAMERA,
    taken: '2025:11:04 18:26:00',
    exposure: '1/4',
    iso: 800,
  });
  await writeTruth('millipede-uv.jpg', {
    width,
    height,
    umPerPxX: camera.umPerPx,
    umPerPxY: camera.umPerPx,
    scaleHolds: 'plane-in-focus',
    taxon: 'Polydesmidae',
    preparation: 'In the field at night, ultraviolet torch (365 nm), macro lens',
    seed: SEED,
    bodies: bodies(rings, line, camera),
  });
}

/** A gentle S across the picture, level with the ground under it, tail at the left. */
function bodyLine(ground: (x: number, y: number) => number): BodyLine {
  const steps = 600;
  const ds = (LENGTH * 1.1) / steps;
  const places: Vector[] = [];
  let x = 0;
  let y = 0;
  for (let i = 0; i <= steps; i++) {
    const turn = 0.86 * Math.cos((2 * Math.PI * i * ds) / 15.5 + 0.5) + 0.02;
    places.push(vec(x, y, 0));
    x += Math.cos(turn) * ds;
    y += Math.sin(turn) * ds;
  }
  const used = places.slice(0, Math.round(LENGTH / ds));
  const cx = (Math.min(...used.map((p) => p.x)) + Math.max(...used.map((p) => p.x))) / 2;
  const cy = (Math.min(...used.map((p) => p.y)) + Math.max(...used.map((p) => p.y))) / 2;
  const moved = places.map((p) => vec(p.x - cx - 0.1, p.y - cy, 0));
  const below = moved.map((p) => Math.max(...[-0.9, 0, 0.9].map((d) => ground(p.x, p.y + d))));
  const level = below.map((_, i) => {
    const near = below.slice(Math.max(0, i - 45), i + 46);
    return near.reduce((a, b) => a + b, 0) / near.length + 0.74;
  });
  return {
    length: LENGTH,
    at(s) {
      const f = Math.max(0, Math.min(steps - 1.001, s / ds));
      const i = Math.floor(f);
      const t = f - i;
      const p = moved[i]!;
      const q = moved[i + 1]!;
      const z = level[i]! * (1 - t) + level[i + 1]! * t;
      const back = s < 0 ? s : 0; // the telson's point may reach a little further
      const forward = unit(vec(q.x - p.x, q.y - p.y, 0));
      return {
        place: vec(p.x + (q.x - p.x) * t + forward.x * back, p.y + (q.y - p.y) * t + forward.y * back, z),
        forward,
      };
    },
  };
}

/** Textile fibres that drifted here; every torch finds them. */
function layLint(solids: Solids, random: Random, ground: (x: number, y: number) => number): void {
  for (let n = 0; n < 9; n++) {
    let x = random.between(-8, 8);
    let y = random.between(-6, 6);
    let turn = random.between(0, 6.28);
    let bendiness = 0.2 * random.normal();
    const points: Vector[] = [];
    const steps = 8 + Math.floor(random.next() * 18);
    for (let i = 0; i < steps; i++) {
      points.push(vec(x, y, ground(x, y) + 0.03 + 0.05 * random.next()));
      bendiness = 0.8 * bendiness + 0.14 * random.normal();
      turn += bendiness;
      x += 0.11 * Math.cos(turn);
      y += 0.11 * Math.sin(turn);
    }
    solids.chain(
      points,
      points.map(() => 0.009),
      LINT,
      random.next(),
    );
  }
}

function barkUnderTorch(noise: Noise): Material {
  return (at, s) => {
    const { x, y } = at;
    const f = 0.75 + 0.6 * noise.fractal(x * 3, y * 11, 2.5, 3) + 0.3 * noise.at(x * 20, y * 22, 1);
    s.r = 0.013 * f;
    s.g = 0.0075 * f;
    s.b = 0.04 * f;
    const fungus = smooth(0.17, 0.42, noise.fractal(x * 0.5, y * 0.7, 14.2, 4));
    s.r += fungus * 0.05 * f;
    s.g += fungus * 0.024 * f;
    s.b += fungus * 0.008;
    const algae = smooth(0.12, 0.4, noise.fractal(x * 0.6, y * 0.8, 51.7, 4));
    s.r += algae * 0.06 * f;
    const speck = smooth(0.52, 0.6, noise.at(x * 7, y * 7, 70.3));
    s.r += speck * 0.1;
    s.g += speck * 0.16;
    s.b += speck * 0.26;
    s.gloss = 0.02;
    s.rough = 0.5;
    bend(s, at, 0.015, (px, py) => 0.014 * noise.fractal(px * 16, py * 24, 9.1, 2));
  };
}

function materials(noise: Noise): Material[] {
  const glow = (s: Parameters<Material>[1], f: number, blue: number): void => {
    s.r = 0.035 * f + 0.1 * blue;
    f = Math.max(0.06, f);
    s.g = 0.6 * f;
    s.b = (0.53 + 0.2 * blue) * f;
    s.er = 0.004 * f;
    s.eg = 0.022 * f;
    s.eb = 0.021 * f;
    s.through = 0.12;
  };
  const back: Material = (at, s) => {
    const head = at.shade < 0;
    const edge = head ? 0.2 : smooth(0.62, 0.84, Math.abs(at.u * 2 - 1));
    const rear = head ? 0 : smooth(0.86, 0.98, at.v);
    const mottle =
      noise.fractal(at.x * 2.2, at.y * 2.2, at.z * 2.2, 3) + 0.35 * noise.at(at.x * 15, at.y * 15, at.z * 15);
    const boss = head ? 0.4 : bossHeight(Math.min(1, Math.abs(at.u * 2 - 1) * 1.18), at.v) / BOSS;
    const young = 0.85 + 0.3 * noise.at(at.shade * 9, 3.3, 0.5); // no two rings glow alike
    glow(s, young * (0.2 + 0.3 * boss + 0.5 * edge + 0.3 * rear + 0.55 * mottle), 0.3 * edge);
    s.gloss = 0.03;
    s.rough = 0.36;
    bend(s, at, 0.008, (x, y, z) => 0.004 * noise.at(x * 24, y * 24, z * 24));
  };
  const flank: Material = (at, s) => {
    glow(s, 0.5 + 0.3 * noise.at(at.x * 6, at.y * 6, at.z * 6), 0);
    s.gloss = 0.03;
    s.rough = 0.3;
  };
  const leg: Material = (at, s) => glow(s, 0.7 + 0.25 * at.shade, 0.55);
  const moss: Material = (at, s) => {
    const f = 0.6 + 0.7 * at.shade;
    s.r = 0.24 * f;
    s.g = 0.012 * f;
    s.b = 0.045 * f;
    s.through = 0.6;
    s.gloss = 0.02;
    s.rough = 0.4;
  };
  const lint: Material = (at, s) => {
    s.r = 0.35 + 0.2 * at.shade;
    s.g = 0.5;
    s.b = 0.95;
    s.through = 0.8;
  };
  return [back, flank, leg, moss, lint];
}

function bodies(rings: readonly Ring[], line: BodyLine, camera: Camera): TrueBody[] {
  const flat = (p: Vector): { x: number; y: number } => {
    const { x, y } = camera.project(p);
    return { x, y };
  };
  const over = (s: number): Vector => add(line.at(s).place, times(vec(0, 0, 1), 0.3));
  const head = flat(over(line.length));
  const tail = flat(over(0));
  const middle = camera.project(over(line.length / 2));
  const whole: TrueBody = {
    id: 'millipede',
    kind: 'animal',
    center: { x: middle.x, y: middle.y },
    axesUm: { length: LENGTH * 1000, width: BROAD * 1000 },
    angle: (Math.atan2(head.y - tail.y, head.x - tail.x) * 180) / Math.PI,
    focus: middle.before * 1000,
    edgeRule: 'front of the head to tip of the telson along the middle of the back, without antennae; keel to keel',
    points: { middleLine: Array.from({ length: 41 }, (_, i) => flat(over((line.length * (40 - i)) / 40))) },
  };
  return [
    whole,
    ...rings.map((ring): TrueBody => {
      const left = flat(ring.left);
      const right = flat(ring.right);
      const at = camera.project(ring.middle);
      return {
        id: `ring${ring.number}`,
        kind: 'ring',
        center: { x: at.x, y: at.y },
        axesUm: { length: (LENGTH * 955) / rings.length, width: ring.width * 1000 },
        angle: (Math.atan2(right.y - left.y, right.x - left.x) * 180) / Math.PI,
        focus: at.before * 1000,
        edgeRule: 'keel to keel; length is the distance to the next ring',
        points: { left, right },
      };
    }),
  ];
}
