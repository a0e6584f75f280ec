/**
 * Spores of *Mycena galericulata* in Congo red, bright field, in colour.
 *
 * @see Watling 1973, Identification of the Larger Fungi: spores 9–12 × 6–8 µm
 */
import { writeJpeg } from '../encode.js';
import { Random } from '../random.js';
import { writeTruth } from '../truth.js';
import { BENCH } from './bench.js';
import { colour, crop, type Frame } from './camera.js';
import { layMottle, laySpecks } from './litter.js';
import { formImage } from './optics.js';
import { settle } from './scatter.js';
import { Specimen } from './specimen.js';
import { laySpore, type SporeLook } from './spore.js';
import { sporeBodies } from './spore-truth.js';

const SEED = 1973;
const UM_PER_PX = 0.1102;
const FRAME: Frame = { left: 224, top: 424, width: 1600, height: 1200 };
const SOURCE = 'Watling R. 1973, Identification of the Larger Fungi (Hulton; Project Gutenberg 60159)';

const LOOK: SporeLook = {
  edgeLead: 0,
  wall: { thickness: 0.36, index: 0.075, pigment: 0.34 },
  contents: { index: 0.03, pigment: 0.016, grain: 0.03 },
  drops: { most: 3, index: 0.085 },
  apiculus: { length: 0.8, radius: 0.36 },
};

/** Congo red lets red through and absorbs green most. */
const COLOURS = [
  { wavelength: 0.61, pigment: 0.1 },
  { wavelength: 0.54, pigment: 1 },
  { wavelength: 0.46, pigment: 0.72 },
] as const;

export async function renderSporesEllipsoid(directions = 30): Promise<void> {
  const random = new Random(SEED);
  const specimen = new Specimen(2048, UM_PER_PX, [-6, -2.5, 0, 2.5, 6]);
  const spores = settle(random, {
    count: 56,
    sociable: 0.34,
    afloat: 0.2,
    floatHeights: [-6, -2.5, 2.5, 5.5],
    unevenness: 0.3,
    area: { left: 140, top: 330, width: 1770, height: 1390 },
    umPerPx: UM_PER_PX,
    size: (r) => {
      const length = r.normalWithin(10.5, 0.62, 9.1, 11.9);
      return { length, width: r.normalWithin(length * 0.672, 0.25, 6.1, 7.9) };
    },
  });
  layMottle(specimen, random, 420, 0.006);
  laySpecks(specimen, random, 90, 1.8);
  for (const spore of spores) laySpore(specimen, spore, LOOK);
  const microscope = { aperture: 0.95, condenser: { inner: 0, outer: 0.42 }, medium: 1.34, directions };
  const lamp = { x: 0.47, y: 0.55, fall: 0.16 };
  const [r, g, b] = COLOURS.map((c, i) => crop(formImage(specimen, microscope, c, i * 0.7), 2048, FRAME, lamp));
  const pixels = colour([r!, g!, b!], [0.86, 0.73, 0.66], SEED, 0.012);
  await writeJpeg('spores-ellipsoid.jpg', pixels, FRAME.width, FRAME.height, {
    ...BENCH.notes,
    lens: '40x 0.95',
    taken: '2025:11:05 20:14:00',
    offset: '+00:00',
  });
  await writeTruth('spores-ellipsoid.jpg', {
    width: FRAME.width,
    height: FRAME.height,
    umPerPxX: UM_PER_PX,
    umPerPxY: UM_PER_PX,
    scaleHolds: 'everywhere',
    taxon: 'Mycena galericulata',
    published: [
      { character: 'spore length', minUm: 9, maxUm: 12, source: SOURCE },
      { character: 'spore width', minUm: 6, maxUm: 8, source: SOURCE },
    ],
    preparation: 'Congo red in ammonia, bright field, colour',
    seed: SEED,
    bodies: sporeBodies(spores, FRAME, UM_PER_PX),
  });
}
