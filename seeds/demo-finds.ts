import type { NewFind, PlaceInput } from '../shared/contracts/finds.js';
import { Hand, measurable } from './demo-bodies.js';
import { calibrateBench, optics } from './demo-rigs.js';
import type { DemoTeller } from './demo-teller.js';
import { Random } from './pictures/random.js';

/*
 * The story of the demo. People, places and finds are invented, and the places lie in the open sea, so that no
 * real one is pointed at; the taxa are real, and the bodies measured are those that the pictures were drawn with.
 */

/** Places of an invented town, in the middle of the North Sea. */
const PLACES = {
  depot: place(
    'Tram depot, inspection pit 3, under the fourth sleeper',
    'The old tram depot, Calder Wick',
    56.31742,
    2.90418,
  ),
  towpath: place('Towpath, 40 paces past the blue bridge, ash log', 'Canal towpath, Calder Wick', 56.31381, 2.91107),
  allotment: place('Allotment 17, behind the water butt', 'The allotments, Calder Wick', 56.32013, 2.89756),
  wall: place(
    'Lock-keeper’s garden wall, third gap from the gate',
    'A canal-side garden, Calder Wick',
    56.31266,
    2.91582,
  ),
} as const;

function place(exact: string, publicWords: string, latitude: number, longitude: number): PlaceInput {
  return { exact: { words: exact, latitude, longitude, uncertaintyM: 8 }, publicWords, sensitivity: 'medium' };
}

/** The most bodies that anybody measures in one series. */
const ENOUGH = 30;

/** Tells everything, saying what was told. */
export async function tellFinds(teller: DemoTeller, say: (told: string) => void): Promise<void> {
  await hemitrichia(teller);
  say('slime moulds from the depot, measured and renamed');
  await mycena(teller);
  say('small mushrooms from the allotments');
  await trichia(teller);
  say('threads from the towpath');
  await millipede(teller);
  say('a millipede at night');
  await unfinished(teller);
  say('what is private, held back, or still in the tray');
}

/** The main job end to end: field and bench, a calibration, two observers, a wrong name put right. */
async function hemitrichia(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
  const [heads] = await teller.upload(people.photographer, [['heads-on-bark.jpg', 'CWSL2214.JPG']]);
  const findId = await teller.make(people.photographer, {
    ...at('depot', clock.day(-1), 'decorticated birch sleeper, soft'),
    imageIds: [heads as string],
  });
  await teller.describe(heads as string, {
    title: 'Yellow heads on a sleeper',
    altText: 'A row of yellow, pear-shaped heads on short dark stalks, each a few millimetres tall, on wet bark.',
    light: 'daylight',
  });
  await rooms.scales.set(
    people.photographer,
    heads as string,
    optics(teller.truth('heads-on-bark.jpg').umPerPxX, 0.6, 1),
  );
  await teller.name('photographer', findId, 'Trichia varia', {
    ...{ qualifier: '', confidence: 'a guess' },
    reason: 'By the look of it: yellow, in a row, on dead wood.',
  });

  await measureHeads(teller, heads as string);

  clock.pass(2);
  const [spores, micrometer] = await teller.upload(people.photographer, [
    ['spores-clavata.tif', 'bench_0041.tif'],
    ['stage-micrometer.jpg', 'bench_0042.jpg'],
  ]);
  await rooms.finds.addObservation(findId, people.photographer, {
    ...{ kind: 'at the bench', observedOn: clock.day(), substrate: '' },
    remarks: 'One head crushed in a drop of water; the threads wind in spirals.',
    imageIds: [spores as string, micrometer as string],
  });
  await teller.prepare('photographer', findId, {
    ...{ title: 'Slide 1', part: 'spores and threads', medium: 'water', stain: '', condition: 'fresh' },
    imageIds: [spores as string],
  });
  await teller.describe(spores as string, {
    title: 'Spores in water',
    altText: 'Round, finely roughened spores in pale light, some touching, some out of focus.',
    light: 'bright field',
  });
  await teller.describe(micrometer as string, {
    title: 'Stage micrometer, 100×',
    altText: 'Dark lines of a stage micrometer, ten micrometres apart.',
    light: 'bright field',
  });
  await calibrateBench(teller, spores as string, micrometer as string);

  const rules = { structure: 'spore', edgeRule: 'outer', ornamentIncluded: false } as const;
  const picture = teller.truth('spores-clavata.tif');
  const bodies = measurable(picture, 'spore', 3.5).slice(0, ENOUGH);
  const imre = new Hand(new Random(2214));
  await teller.measure(
    'photographer',
    spores as string,
    rules,
    bodies.map((body) => imre.cross(body, picture)),
  );
  clock.pass(1);
  const maud = new Hand(new Random(41));
  await teller.measure(
    'identifier',
    spores as string,
    rules,
    bodies.slice(0, 12).map((body) => maud.cross(body, picture)),
  );
  await pointAtHead(teller, heads as string);
  const right = await teller.name('identifier', findId, 'Hemitrichia clavata', {
    ...{ qualifier: '', confidence: 'certain' },
    reason: 'Stalked, with a deep cup left below; spores 8–9 µm, too small for Trichia varia, which has 12–14.',
  });
  clock.pass(1);
  await rooms.determinations.decide(findId, right);
}

/** Heights from the foot of the stalk to the tip, of the heads near the plane in focus: the scale holds there. */
async function measureHeads(teller: DemoTeller, imageId: string): Promise<void> {
  const hand = new Hand(new Random(2200));
  const heads = measurable(teller.truth('heads-on-bark.jpg'), 'head', 400);
  const rules = { structure: 'other:total height', edgeRule: 'outer', ornamentIncluded: null } as const;
  const drawn = heads.map((body) => hand.upright(body));
  await teller.measure('photographer', imageId, rules, drawn);
}

async function pointAtHead(teller: DemoTeller, imageId: string): Promise<void> {
  const picture = teller.truth('heads-on-bark.jpg');
  const head = picture.bodies
    .filter((body) => body.kind === 'head' && !body.cut && body.points?.['tip'])
    .sort((a, b) => Math.abs(a.focus) - Math.abs(b.focus))[0];
  if (!head) return;
  const label = { x: Math.min(head.center.x + 140, picture.width - 40), y: Math.max(head.center.y - 160, 40) };
  await teller.point(
    'identifier',
    imageId,
    head.center,
    label,
    'The lower half stays as a cup when the head has opened.',
  );
}

async function mycena(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
  clock.pass(6);
  const file = 'spores-ellipsoid.jpg';
  const [spores] = await teller.upload(people.photographer, [[file, 'bench_0057.jpg']]);
  const findId = await teller.make(people.photographer, {
    ...at('allotment', clock.day(-2), 'stump of a plum tree'),
    imageIds: [],
  });
  await rooms.finds.addObservation(findId, people.photographer, {
    ...{ kind: 'at the bench', observedOn: clock.day(), substrate: '', remarks: 'From a print of one cap on glass.' },
    imageIds: [spores as string],
  });
  await teller.prepare('photographer', findId, {
    ...{ title: 'Spore print', part: 'spores', medium: 'ammonia', stain: 'Congo red', condition: 'fresh' },
    imageIds: [spores as string],
  });
  await teller.describe(spores as string, {
    title: 'Spores from a print',
    altText: 'Smooth oval spores with a small peg at one end, walls stained pink.',
    light: 'bright field',
  });
  const picture = teller.truth(file);
  await rooms.scales.set(people.photographer, spores as string, optics(picture.umPerPxX, 40, 0.5));
  const hand = new Hand(new Random(57));
  const bodies = measurable(picture, 'spore', 3.5).slice(0, ENOUGH);
  const rules = { structure: 'spore', edgeRule: 'outer', ornamentIncluded: null } as const;
  await teller.measure(
    'photographer',
    spores as string,
    rules,
    bodies.map((body) => hand.cross(body, picture)),
  );
  await teller.name('photographer', findId, picture.taxon ?? 'Mycena galericulata', {
    ...{ qualifier: 'cf.', confidence: 'fairly sure' },
    reason: 'Clustered on a stump, grey-brown, gills turning pink, spores 9–12 × 6–8 µm; basidia not looked at.',
  });
}

async function trichia(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
  clock.pass(8);
  const file = 'threads-dark-field.jpg';
  const [threads] = await teller.upload(people.identifier, [[file, 'MOL-0312.jpg']]);
  const findId = await teller.make(people.identifier, {
    ...at('towpath', clock.day(-3), 'underside of an ash log'),
    imageIds: [],
  });
  await rooms.finds.addObservation(findId, people.identifier, {
    ...{
      kind: 'at the bench',
      observedOn: clock.day(),
      substrate: '',
      remarks: 'Crowded golden heads without stalks.',
    },
    imageIds: [threads as string],
  });
  await teller.prepare('identifier', findId, {
    ...{ title: 'Slide A', part: 'threads and spores', medium: 'water', stain: '', condition: 'revived' },
    imageIds: [threads as string],
  });
  await teller.describe(threads as string, {
    title: 'Threads with spiral bands',
    altText: 'Bright threads wound with spiral bands on black, among a few round spores.',
    light: 'dark field',
    licence: 'by',
  });
  const picture = teller.truth(file);
  await rooms.scales.set(people.identifier, threads as string, optics(picture.umPerPxX, 40, 0.5));
  const hand = new Hand(new Random(312));
  const across = picture.bodies
    .filter((body) => body.kind === 'thread')
    .flatMap((body) => [hand.acrossThread(body, picture), hand.acrossThread(body, picture)])
    .slice(0, ENOUGH);
  await teller.measure(
    'identifier',
    threads as string,
    { structure: 'thread', edgeRule: 'outer', ornamentIncluded: false },
    across,
  );
  const spores = measurable(picture, 'spore', 6).map((body) => hand.cross(body, picture));
  await teller.measure(
    'identifier',
    threads as string,
    { structure: 'spore', edgeRule: 'outer', ornamentIncluded: false },
    spores,
  );
  await teller.name('identifier', findId, picture.taxon ?? 'Trichia favoginea', {
    ...{ qualifier: '', confidence: 'fairly sure' },
    reason: 'Threads 6–7 µm across with even spiral bands, spores 12–14 µm; heads crowded and without stalks.',
  });
}

/** A picture that nobody has given a scale: it says so, and measures in pixels. */
async function millipede(teller: DemoTeller): Promise<void> {
  const { clock, people } = teller;
  clock.pass(5);
  const [animal] = await teller.upload(people.photographer, [['millipede-uv.jpg', 'CWSL2301.JPG']]);
  const find = at('depot', clock.day(-1), 'under a brick on cinders');
  const findId = await teller.make(people.photographer, {
    ...find,
    place: { ...find.place, sensitivity: 'high' },
    observation: { ...find.observation, remarks: 'After dark, ultraviolet torch; put back under its brick.' },
    imageIds: [animal as string],
  });
  await teller.describe(animal as string, {
    title: 'A flat-backed millipede under ultraviolet light',
    altText: 'A millipede of twenty keeled rings, glowing teal on dark violet ground.',
    light: 'ultraviolet',
  });
  await teller.name('photographer', findId, 'Polydesmidae', {
    ...{ qualifier: 'indet.', confidence: 'fairly sure' },
    reason: 'Twenty rings with keels. The species needs a male and the parts that were not looked at.',
  });
}

async function unfinished(teller: DemoTeller): Promise<void> {
  const { clock, people } = teller;
  clock.pass(6);
  await teller.make(people.photographer, {
    ...at('wall', clock.day(-1), 'moss on mortar'),
    ...{ imageIds: [], visibility: 'private' },
  });
  clock.pass(3);
  const held = await teller.make(people.identifier, {
    ...at('towpath', clock.day(-1), 'same ash log, lower end'),
    ...{ imageIds: [], visibility: 'held', heldUntil: clock.dayToCome(90) },
  });
  await teller.name('identifier', held, 'Lamproderma scintillans', {
    ...{ qualifier: 'cf.', confidence: 'a guess' },
    reason: 'Iridescent heads, collected; waits for its spores to be measured.',
  });
  clock.pass(7);
  // the card was read twice: the tray says that these bytes are known
  await teller.upload(people.photographer, [['heads-on-bark.jpg', 'CWSL2214 copy.JPG']]);
}

/** Most of a find, public, with one look in the field. */
function at(where: keyof typeof PLACES, observedOn: string, substrate: string): Omit<NewFind, 'imageIds'> {
  return {
    observation: { kind: 'in the field', observedOn, substrate, remarks: '' },
    place: PLACES[where],
    visibility: 'public',
    heldUntil: null,
  };
}
