/**
 * Spores of *Hemitrichia clavata*, bright field, one camera frame in grey.
 *
 * @see Macbride 1922, The North American Slime-Moulds, pp. 264–265: spores yellow, minutely warted, 8–9 µm
 */
import { writeGreyTiff } from '../encode.js';
import { Random } from '../random.js';
import { writeTruth } from '../truth.js';
import { BENCH } from './bench.js';
import { crop, monochrome, type Frame } from './camera.js';
import { layMottle, laySpecks } from './litter.js';
import { formImage } from './optics.js';
import { settle } from './scatter.js';
import { Specimen } from './specimen.js';
import { sporeBodies } from './spore-truth.js';
import { laySpore, type SporeLook } from './spore.js';

const SEED = 264;
const FRAME: Frame = { left: 328, top: 504, width: BENCH.width, height: BENCH.height };

const LOOK: SporeLook = {
  edgeLead: 0.19,
  wall: { thickness: 0.48, index: 0.08, pigment: 0.19 },
  contents: { index: 0.022, pigment: 0.006, grain: 0.03 },
  warts: { spacing: 0.74, radius: 0.145, path: 0.085, pigment: 0.2 },
};

export async function renderSporesClavata(directions = 40): Promise<void> {
  const random = new Random(SEED);
  const specimen = new Specimen(2048, BENCH.umPerPx, [-6, -3.2, -1.2, 0.6, 2.8, 5.4]);
  const spores = settle(random, {
    count: 46,
    sociable: 0.62,
    afloat: 0.16,
    floatHeights: [-5.5, 5, 3.2, -3.2, -2.2],
    unevenness: 0.4,
    area: { left: 230, top: 400, width: 1590, height: 1250 },
    umPerPx: BENCH.umPerPx,
    size: (r) => {
      const length = r.normalWithin(8.52, 0.21, 8.1, 8.95);
      return { length, width: Math.max(8.02, length * r.between(0.965, 1)) };
    },
  });
  layMottle(specimen, random, 260, 0.004);
  laySpecks(specimen, random, 70, 1.6);
  for (const spore of spores) laySpore(specimen, spore, LOOK);
  const light = formImage(specimen, { ...BENCH.objective, directions }, { wavelength: 0.546, pigment: 1 }, 0);
  const pixels = monochrome(crop(light, 2048, FRAME, { x: 0.56, y: 0.44, fall: 0.13 }), SEED, 2700, 0.95);
  await writeGreyTiff('spores-clavata.tif', pixels, FRAME.width, FRAME.height);
  await writeTruth('spores-clavata.tif', {
    width: FRAME.width,
    height: FRAME.height,
    umPerPxX: BENCH.umPerPx,
    umPerPxY: BENCH.umPerPx,
    scaleHolds: 'everywhere',
    taxon: 'Hemitrichia clavata',
    published: [
      {
        character: 'spore diameter',
        minUm: 8,
        maxUm: 9,
        source: 'Macbride T.H. 1922, The North American Slime-Moulds, new and revised ed., pp. 264–265',
      },
    ],
    preparation: 'Water mount, bright field, green filter, 12 bits a pixel',
    seed: SEED,
    bodies: sporeBodies(spores, FRAME, BENCH.umPerPx),
  });
}
