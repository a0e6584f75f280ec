/** A fingertip held beside a bonnet mushroom on a mossy log: a scale that can only be estimated. */
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
import { writeTruth } from '../truth.js';
import { bark, barkColour, smooth } from './bark.js';
import { layBonnet, type Bonnet } from './bonnet.js';
import { FIELD_CAMERA } from './field-camera.js';
import { layFinger, skinRidges, type Finger } from './fingertip.js';
import { layMoss } from './moss.js';

const SEED = 97;
const SKIN = 0,
  NAIL = 1,
  CAP = 2,
  GILL = 3,
  STEM = 4,
  MOSS = 5;

const FINGER: Finger = {
  tip: vec(0.3, 0.3, 8.3),
  axis: unit(vec(1, 0.22, 0.13)),
  up: unit(vec(-0.12, -0.62, 0.78)),
  width: 13.8,
  length: 34,
};

const BONNET: Bonnet = {
  foot: vec(-6.6, 1.1, -1.2),
  rim: vec(-5.6, 0.1, 9.4),
  axis: unit(vec(0.1, -0.12, 1)),
  width: 3.6,
};

export async function renderFingerBesideCap(rays = 12, width = 1600): Promise<void> {
  const height = Math.round(width / 1.5);
  const noise = new Noise(SEED);
  const random = new Random(SEED);
  const ground = bark(noise, { left: -34, near: -14, columns: 1360, rows: 1200, step: 0.05, trunk: 60, relief: 1.2 });
  const solids = new Solids();
  layFinger(solids, noise, FINGER, SKIN, NAIL);
  layBonnet(solids, noise, BONNET, { cap: CAP, gill: GILL, stem: STEM });
  for (let i = 0; i < 150; i++) {
    const x = random.between(-20, 20);
    const y = random.normalWithin(3, 4, -6, 16);
    if (Math.hypot(x - BONNET.foot.x, y - BONNET.foot.y) < 1) continue;
    layMoss(solids, random, vec(x, y, ground.heightAt(x, y) - 0.2), random.between(1.2, 3.4), MOSS);
  }
  const camera = new Camera({
    from: vec(-1, -104, 24),
    at: vec(1.2, -0.6, 6.8),
    fieldWidth: 30,
    width,
    height,
    aperture: 2.6,
  });
  const scene: Scene = {
    solids,
    ground,
    camera,
    materials: materials(noise),
    groundMaterial: barkColour(noise, -0.02, 0.1),
    lights: [{ ...unit(vec(-0.55, -0.2, 0.95)), spread: 0.3, r: 2.5, g: 2.35, b: 2.05 }],
    sky: (x, y, z, out) => {
      const up = Math.max(0, z);
      const front = Math.max(0, 0.3 * x - 0.8 * y + 0.4 * z);
      const leaves = y > 0.3 && z < 0.6 ? smooth(0, 0.42, noise.fractal((x / y) * 17, (z / y) * 19, 12.5, 2)) : 0;
      out[0] = 0.02 + 0.4 * up + 0.42 * front ** 2 + 0.1 * leaves;
      out[1] = 0.027 + 0.46 * up + 0.44 * front ** 2 + 0.14 * leaves;
      out[2] = 0.018 + 0.5 * up + 0.46 * front ** 2 + 0.04 * leaves;
    },
  };
  const light = denoise(expose(scene, rays, SEED), 0.75);
  const pixels = develop(light, width, height, {
    exposure: 1.15,
    saturation: 1.05,
    grain: 0.01,
    vignette: 0.22,
    glow: 0.04,
    seed: SEED,
  });
  await writeJpeg('finger-beside-cap.jpg', pixels, width, height, { ...FIELD_CAMERA, taken: '2025:11:03 11:05:00' });
  await writeTruth('finger-beside-cap.jpg', truth(camera));
}

function truth(camera: Camera): Parameters<typeof writeTruth>[1] {
  const { width, height } = camera.view;
  const flat = (p: Vector): { x: number; y: number } => {
    const { x, y } = camera.project(p);
    return { x, y };
  };
  const rim = camera.project(BONNET.rim);
  const joint = add(FINGER.tip, times(FINGER.axis, 12));
  const across = unit(vec(FINGER.axis.z, 0, -FINGER.axis.x));
  return {
    width,
    height,
    umPerPxX: camera.umPerPx,
    umPerPxY: camera.umPerPx,
    scaleHolds: 'plane-in-focus',
    taxon: 'Mycena acicula',
    published: [
      {
        character: 'cap diameter',
        minUm: 2000,
        maxUm: 4000,
        source: 'Atkinson G.F. 1903, Studies of American Fungi, 2nd ed. (Holt), p. 97',
      },
    ],
    preparation: 'In the field, a finger held beside the cap, macro lens',
    seed: SEED,
    bodies: [
      {
        id: 'cap',
        kind: 'cap',
        center: { x: rim.x, y: rim.y },
        axesUm: { length: BONNET.width * 1000, width: BONNET.width * 1000 },
        angle: 0,
        focus: rim.before * 1000,
        edgeRule: 'rim to rim, mean of the gently waved margin',
        points: {
          left: flat(add(BONNET.rim, vec(-BONNET.width / 2, 0, 0))),
          right: flat(add(BONNET.rim, vec(BONNET.width / 2, 0, 0))),
        },
      },
      {
        id: 'finger',
        kind: 'finger',
        center: flat(joint),
        axesUm: { length: FINGER.length * 1000, width: FINGER.width * 1000 },
        angle: 90,
        focus: camera.project(joint).before * 1000,
        cut: true,
        edgeRule:
          'across the finger, side to side, at the root of the nail; it is turned, so that less than this shows',
        points: {
          tip: flat(FINGER.tip),
          across: [flat(add(joint, times(across, -6.9))), flat(add(joint, times(across, 6.9)))],
        },
      },
    ],
  };
}

function materials(noise: Noise): Material[] {
  const skin: Material = (at, s) => {
    const around = Math.abs(at.u - 0.5) * 2;
    // Redder at the tip, round the nail, and in blotches.
    const blood =
      0.55 * smooth(0.5, 0.1, at.v) + 0.5 * noise.fractal(at.x * 0.35, at.y * 0.35, at.z * 0.35, 3) + 0.25 * around;
    const speck = 1 + 0.1 * noise.at(at.x * 4, at.y * 4, at.z * 4);
    s.r = (0.56 - 0.03 * blood) * speck;
    s.g = (0.31 - 0.14 * blood) * speck;
    s.b = (0.215 - 0.11 * blood) * speck;
    s.gloss = 0.028;
    s.rough = 0.5;
    s.through = 0.22;
    bendByChart(s, at, noise);
  };
  const nail: Material = (at, s) => {
    const free = smooth(0.16, 0.12, at.v);
    const moon = smooth(0.2, 0.12, Math.hypot((at.u - 0.5) * 0.8, 1.03 - at.v));
    s.r = 0.57 + 0.1 * free + 0.05 * moon;
    s.g = 0.32 + 0.28 * free + 0.12 * moon;
    s.b = 0.26 + 0.25 * free + 0.13 * moon;
    s.gloss = 0.05;
    s.rough = 0.3;
    s.through = 0.2;
    bend(s, at, 0.05, (x, y, z) => 0.01 * noise.at(x * 1.5, y * 3, z * 3));
  };
  const cap: Material = (at, s) => {
    const rim = smooth(0.35, 1, at.v);
    const stripe = 0.5 + 0.5 * Math.cos(22 * 2 * Math.PI * at.u);
    const pale = rim * (0.6 + 0.4 * stripe);
    const speck = 1 + 0.08 * noise.at(at.x * 14, at.y * 14, at.z * 14);
    s.r = (0.78 + 0.04 * pale) * speck;
    s.g = (0.17 + 0.3 * pale) * speck;
    s.b = (0.025 + 0.05 * pale) * speck;
    s.gloss = 0.035;
    s.rough = 0.36;
    s.through = 0.5;
    bend(s, at, 0.01, (x, y, z) => 0.006 * noise.at(x * 12, y * 12, z * 12));
  };
  const gill: Material = (_at, s) => {
    s.r = 0.78;
    s.g = 0.6;
    s.b = 0.3;
    s.through = 0.6;
  };
  const stem: Material = (at, s) => {
    const f = 1 + 0.12 * noise.at(at.x * 5, at.y * 5, at.z * 2);
    s.r = 0.74 * f;
    s.g = (0.42 + 0.12 * at.u) * f;
    s.b = 0.06 * f;
    s.gloss = 0.03;
    s.rough = 0.35;
    s.through = 0.45;
  };
  const moss: Material = (at, s) => {
    const f = 0.65 + 0.7 * at.shade;
    s.r = 0.075 * f;
    s.g = 0.12 * f;
    s.b = 0.022 * f;
    s.gloss = 0.025;
    s.rough = 0.4;
    s.through = 0.6;
  };
  return [skin, nail, cap, gill, stem, moss];
}

/** Ridges of the skin, by the finger's chart: slopes along it and round it bend the normal. */
function bendByChart(s: Parameters<Material>[1], at: Parameters<Material>[0], noise: Noise): void {
  const along = FINGER.length * at.v ** 1.5;
  const step = 0.02;
  const here = skinRidges(noise, FINGER, at.u, at.v);
  const further = skinRidges(noise, FINGER, at.u, ((along + step) / FINGER.length) ** (1 / 1.5));
  const du = step / (Math.PI * FINGER.width);
  const round = skinRidges(noise, FINGER, at.u + du, at.v);
  const a = (further - here) / step;
  const r = (round - here) / step;
  const { axis } = FINGER;
  // Round the finger: the normal turned about the axis.
  const tx = axis.y * s.nz - axis.z * s.ny;
  const ty = axis.z * s.nx - axis.x * s.nz;
  const tz = axis.x * s.ny - axis.y * s.nx;
  s.nx -= a * axis.x + r * tx;
  s.ny -= a * axis.y + r * ty;
  s.nz -= a * axis.z + r * tz;
}
