/**
 * Elaters of *Trichia favoginea* in dark field: free threads with spiral bands and short pointed ends, with spores.
 *
 * @see Macbride 1922, The North American Slime-Moulds, p. 272: elaters 6–7 µm wide, spores 12–14 µm
 */
import { writeJpeg } from '../encode.js';
import { Random } from '../random.js';
import { writeTruth, type TrueBody } from '../truth.js';
import { BENCH } from './bench.js';
import { colour, crop, type Frame } from './camera.js';
import { layElater, type Elater } from './elater.js';
import { laySpecks } from './litter.js';
import { formImage } from './optics.js';
import { settle } from './scatter.js';
import { Specimen } from './specimen.js';
import { laySpore } from './spore.js';
import { sporeBodies } from './spore-truth.js';

const SEED = 272;
const UM_PER_PX = 0.1464;
const FRAME: Frame = { left: 224, top: 424, width: 1600, height: 1200 };
const SOURCE = 'Macbride T.H. 1922, The North American Slime-Moulds, new and revised ed., p. 272';
/** Gold of the threads, over the lamp's white. */
const TINT = [1, 0.64, 0.17] as const;

export async function renderThreads(directions = 28): Promise<void> {
  const random = new Random(SEED);
  const specimen = new Specimen(2048, UM_PER_PX, [-5, -2.2, 0, 2.2, 5]);
  const elaters = Array.from({ length: 11 }, (_, i) => grow(random, i));
  for (const elater of elaters) layElater(specimen, elater);
  const spores = settle(random, {
    count: 9,
    sociable: 0.3,
    afloat: 0.25,
    floatHeights: [-4.8, 4.8],
    unevenness: 0.3,
    area: { left: 260, top: 470, width: 1500, height: 1100 },
    umPerPx: UM_PER_PX,
    size: (r) => {
      const length = r.normalWithin(13, 0.4, 12.1, 13.9);
      return { length, width: Math.max(12.05, length * r.between(0.97, 1)) };
    },
  });
  for (const spore of spores) {
    laySpore(specimen, spore, {
      edgeLead: 0,
      wall: { thickness: 0.5, index: 0.05, pigment: 0.02 },
      contents: { index: 0.012, pigment: 0.002, grain: 0.006 },
      warts: { spacing: 1.7, radius: 0.34, path: 0.05, pigment: 0.01 },
    });
  }
  laySpecks(specimen, random, 60, 0.8);
  const microscope = { aperture: 0.72, condenser: { inner: 0.76, outer: 0.98 }, medium: 1.34, directions };
  const channels = [0.61, 0.54, 0.47].map((wavelength, c) => {
    const light = crop(formImage(specimen, microscope, { wavelength, pigment: 1 }, 0), 2048, FRAME, {
      x: 0.5,
      y: 0.47,
      fall: 0.2,
    });
    return light.map((value) => 0.0035 + 0.004 * TINT[c]! + exposed(value) * TINT[c]!);
  });
  const pixels = colour([channels[0]!, channels[1]!, channels[2]!], [1, 1, 1], SEED, 0.016);
  await writeJpeg('threads-dark-field.jpg', pixels, FRAME.width, FRAME.height, {
    ...BENCH.notes,
    lens: '40x 0.72',
    taken: '2025:11:04 21:37:00',
    offset: '+00:00',
  });
  await writeTruth('threads-dark-field.jpg', {
    width: FRAME.width,
    height: FRAME.height,
    umPerPxX: UM_PER_PX,
    umPerPxY: UM_PER_PX,
    scaleHolds: 'everywhere',
    taxon: 'Trichia favoginea',
    published: [
      { character: 'elater width', minUm: 6, maxUm: 7, source: SOURCE },
      { character: 'spore diameter', minUm: 12, maxUm: 14, source: SOURCE },
    ],
    preparation: 'Water mount, dark field, colour',
    seed: SEED,
    bodies: [...elaters.map((elater, i) => threadBody(elater, i)), ...sporeBodies(spores, FRAME, UM_PER_PX)],
  });
}

/** Exposed so that edges in focus are bright and only few places are white. */
function exposed(value: number): number {
  return value * EXPOSURE;
}
const EXPOSURE = 3.5;

/** A slowly turning path across the grid, that rises and sinks a little. */
function grow(random: Random, index: number): Elater {
  const long = random.next() < 0.75;
  let turn = random.between(-0.9, 0.9) + (index % 3) * 1.05;
  let bend = 0;
  const step = 3;
  const steps = long ? 620 : 220;
  let x = FRAME.left + FRAME.width * random.between(0.12, 0.88) - Math.cos(turn) * step * steps * 0.5;
  let y = FRAME.top + FRAME.height * random.between(0.12, 0.88) - Math.sin(turn) * step * steps * 0.5;
  const base = index % 4 === 3 ? random.between(-5, 5) : 0.9 * random.normal();
  const slope = random.between(-2.5, 2.5);
  const path = Array.from({ length: steps }, (_, i) => {
    bend = 0.985 * bend + 0.00055 * random.normal();
    turn += bend;
    x += Math.cos(turn) * step;
    y += Math.sin(turn) * step;
    return { x, y, height: base + slope * (i / steps - 0.5) };
  });
  return {
    path,
    width: random.normalWithin(6.5, 0.25, 6.05, 6.95),
    bands: 4,
    pitch: random.between(15, 19),
    hand: -1,
    tip: 11,
  };
}

function threadBody(elater: Elater, index: number): TrueBody {
  const inFrame = elater.path.map((p) => ({ x: p.x - FRAME.left, y: p.y - FRAME.top, height: p.height }));
  const shown = inFrame.filter((p) => p.x > 0 && p.y > 0 && p.x < FRAME.width && p.y < FRAME.height);
  const middle = shown[Math.floor(shown.length / 2)] ?? inFrame[Math.floor(inFrame.length / 2)]!;
  const before = shown[Math.floor(shown.length / 2) - 3] ?? middle;
  return {
    id: `t${index + 1}`,
    kind: 'thread',
    center: { x: middle.x, y: middle.y },
    axesUm: { length: elater.path.length * 3 * UM_PER_PX, width: elater.width },
    angle: (Math.atan2(middle.y - before.y, middle.x - before.x) * 180) / Math.PI,
    focus: middle.height,
    ...(shown.length < inFrame.length ? { cut: true } : {}),
    edgeRule: 'outer limit of the wall between the bands; the bands stand out by 0.35 µm',
    points: { middleLine: shown.filter((_, i) => i % 20 === 0).map(({ x, y }) => ({ x, y })) },
  };
}
