/** A stage micrometer, 1 mm in 100 divisions, chromium on glass, at the setting with which the spores were taken. */
import { writeJpeg } from '../encode.js';
import { Random } from '../random.js';
import { writeTruth, type TrueGraduation } from '../truth.js';
import { BENCH } from './bench.js';
import { colour, crop, type Frame } from './camera.js';
import { glyphStrokes } from './glyphs.js';
import { laySpecks } from './litter.js';
import { formImage } from './optics.js';
import { Specimen } from './specimen.js';

const SEED = 1000;
const SIDE = 2048;
const FRAME: Frame = { left: 328, top: 504, width: BENCH.width, height: BENCH.height };
const TURN = (0.7 * Math.PI) / 180;
const LINE_UM = 1.9;
/** Absorbance (of amplitude) of the chromium: 0.5 % of the light passes. */
const CHROMIUM = 2.6;
/** Where the ruling's 440 µm line meets its base, picture px. */
const ORIGIN = { x: 0.508 * BENCH.width, y: 190, positionUm: 440 };
const LENGTHS_UM = { no: 31, fifth: 39, tenth: 47 } as const;

export async function renderMicrometer(directions = 20): Promise<void> {
  const random = new Random(SEED);
  const specimen = new Specimen(SIDE, BENCH.umPerPx, [-5, 0]);
  const chromium = specimen.nearest(0).soot;
  const marks = graduations();
  for (let i = 0; i < chromium.length; i++) {
    const at = onSlide((i % SIDE) + 0.5 - FRAME.left, Math.floor(i / SIDE) + 0.5 - FRAME.top);
    chromium[i] = CHROMIUM * lineCover(at);
  }
  for (const mark of marks) if (mark.long === 'tenth') engrave(chromium, mark);
  layScratch(specimen, random);
  laySpecks(specimen, random, 110, 2.2);
  const microscope = { ...BENCH.objective, medium: 1.52, directions };
  const lamp = { x: 0.55, y: 0.46, fall: 0.12 };
  const [r, g, b] = [0.61, 0.54, 0.46].map((wavelength, i) =>
    crop(formImage(specimen, microscope, { wavelength, pigment: 1 }, i), SIDE, FRAME, lamp),
  );
  const pixels = colour([r!, g!, b!], [0.74, 0.77, 0.7], SEED, 0.012);
  await writeJpeg('stage-micrometer.jpg', pixels, FRAME.width, FRAME.height, {
    ...BENCH.notes,
    taken: '2025:11:03 09:12:00',
    offset: '+00:00',
  });
  await writeTruth('stage-micrometer.jpg', {
    width: FRAME.width,
    height: FRAME.height,
    umPerPxX: BENCH.umPerPx,
    umPerPxY: BENCH.umPerPx,
    scaleHolds: 'everywhere',
    taxon: null,
    preparation: 'Stage micrometer, 1 mm in 100 divisions of 10 µm, bright field, colour',
    seed: SEED,
    bodies: [],
    graduations: marks.filter(({ a, b: end }) => Math.min(a.x, end.x) > 15 && Math.max(a.x, end.x) < FRAME.width - 15),
  });
}

/** Picture px to µm on the slide: along the ruling, and down its lines. */
function onSlide(x: number, y: number): { along: number; down: number } {
  const dx = (x - ORIGIN.x) * BENCH.umPerPx;
  const dy = (y - ORIGIN.y) * BENCH.umPerPx;
  return {
    along: ORIGIN.positionUm + dx * Math.cos(TURN) + dy * Math.sin(TURN),
    down: -dx * Math.sin(TURN) + dy * Math.cos(TURN),
  };
}

function inPicture(along: number, down: number): { x: number; y: number } {
  const u = (along - ORIGIN.positionUm) / BENCH.umPerPx;
  const v = down / BENCH.umPerPx;
  return {
    x: ORIGIN.x + u * Math.cos(TURN) - v * Math.sin(TURN),
    y: ORIGIN.y + u * Math.sin(TURN) + v * Math.cos(TURN),
  };
}

function kind(positionUm: number): TrueGraduation['long'] {
  if (positionUm % 100 === 0) return 'tenth';
  return positionUm % 50 === 0 ? 'fifth' : 'no';
}

/** Every graduation that may show, by the middle line of its chromium. */
function graduations(): TrueGraduation[] {
  return Array.from({ length: 16 }, (_, i) => 370 + 10 * i).map((positionUm) => ({
    a: inPicture(positionUm, 0),
    b: inPicture(positionUm, LENGTHS_UM[kind(positionUm)]),
    positionUm,
    long: kind(positionUm),
  }));
}

/** Part of a pixel that a graduation covers. */
function lineCover({ along, down }: { along: number; down: number }): number {
  const positionUm = Math.round(along / 10) * 10;
  const across = (LINE_UM / 2 - Math.abs(along - positionUm)) / BENCH.umPerPx + 0.5;
  const length = Math.min(down, LENGTHS_UM[kind(positionUm)] - down) / BENCH.umPerPx + 0.5;
  return Math.max(0, Math.min(1, across)) * Math.max(0, Math.min(1, length));
}

/** The number under a tenth line: hundreds of micrometres as tenths of a millimetre. */
function engrave(chromium: Float32Array, mark: TrueGraduation): void {
  const height = 9;
  for (const stroke of glyphStrokes((mark.positionUm / 1000).toFixed(1), height)) {
    for (let i = 0; i + 1 < stroke.length; i++) {
      const from = stroke[i]!;
      const to = stroke[i + 1]!;
      const steps = Math.ceil(Math.hypot(to.x - from.x, to.y - from.y) / (BENCH.umPerPx * 0.5)) + 1;
      for (let s = 0; s <= steps; s++) {
        const t = s / steps;
        const at = inPicture(
          mark.positionUm + from.x + (to.x - from.x) * t,
          LENGTHS_UM.tenth + 2.6 + from.y + (to.y - from.y) * t,
        );
        blot(chromium, at.x + FRAME.left, at.y + FRAME.top, 0.62);
      }
    }
  }
}

function blot(chromium: Float32Array, x: number, y: number, radiusUm: number): void {
  const r = radiusUm / BENCH.umPerPx;
  for (let py = Math.floor(y - r - 1); py <= y + r + 1; py++) {
    for (let px = Math.floor(x - r - 1); px <= x + r + 1; px++) {
      if (px < 0 || py < 0 || px >= SIDE || py >= SIDE) continue;
      const cover = Math.max(0, Math.min(1, r - Math.hypot(px + 0.5 - x, py + 0.5 - y) + 0.5));
      const i = py * SIDE + px;
      chromium[i] = Math.max(chromium[i]!, CHROMIUM * cover);
    }
  }
}

/** A fine scratch in the glass, slightly curved. */
function layScratch(specimen: Specimen, random: Random): void {
  const layer = specimen.nearest(0);
  let turn = 0.36;
  let x = FRAME.left + 700;
  let y = FRAME.top + 640;
  for (let s = 0; s < 1500; s++) {
    turn += 0.0002 * random.normal() + 0.00012;
    x += Math.cos(turn) * 0.7;
    y += Math.sin(turn) * 0.7;
    const depth = 0.025 * (0.6 + 0.4 * Math.sin(s / 60)) * Math.min(1, s / 200);
    specimen.around(x, y, 0.5, (i, dx, dy) => {
      layer.path[i] = layer.path[i]! - depth * Math.exp(-(dx * dx + dy * dy) / 0.04) * 0.35;
    });
  }
}
