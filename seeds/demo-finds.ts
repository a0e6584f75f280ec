import { ENOUGH, Hand, measurable } from './demo-bodies.js';
import { hemitrichia } from './demo-heads.js';
import { at } from './demo-places.js';
import { optics } from './demo-rigs.js';
import type { DemoTeller } from './demo-teller.js';
import { Random } from './pictures/random.js';

/*
 * The story of the demo. People, places and finds are invented; the taxa are real, and the bodies measured are
 * those that the pictures were drawn with.
 */

/** Tells everything, saying what was told. */
export async function tellFinds(teller: DemoTeller, say: (told: string) => void): Promise<void> {
  await mycena(teller);
  say('small mushrooms from the allotments');
  await trichia(teller);
  say('threads from the towpath');
  await millipede(teller);
  say('a millipede at night');
  await acicula(teller);
  say('a cap beside a finger');
  await unfinished(teller);
  say('what is private or held back');
  await hemitrichia(teller);
  say('slime moulds from the depot, measured and renamed');
  await readTwice(teller);
  say('what is still in the tray');
}

async function mycena(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
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
  clock.pass(5);
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
  clock.pass(6);
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

/** No ruler at hand: the finder's own finger, measured once, gives the scale, and says how unsure it is. */
async function acicula(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
  clock.pass(5);
  const file = 'finger-beside-cap.jpg';
  const [cap] = await teller.upload(people.photographer, [[file, 'CWSL2290.JPG']]);
  const findId = await teller.make(people.photographer, {
    ...at('towpath', clock.day(-1), 'mossy bark of a fallen branch'),
    imageIds: [cap as string],
  });
  await teller.describe(cap as string, {
    title: 'A cap beside a finger',
    altText: 'A tiny orange cap on a thin yellow stalk among moss, a quarter as wide as the fingertip held beside it.',
    light: 'daylight',
  });
  const picture = teller.truth(file);
  const hand = new Hand(new Random(97));
  const finger = picture.bodies.find((body) => body.kind === 'finger');
  if (!finger) throw new Error(`There is no finger in ${file}.`);
  await rooms.scales.set(people.photographer, cap as string, { by: 'finger', ...hand.acrossFinger(finger, picture) });
  await teller.measure(
    'photographer',
    cap as string,
    { structure: 'cap', edgeRule: 'outer', ornamentIncluded: null },
    picture.bodies.filter((body) => body.kind === 'cap').map((body) => hand.acrossCap(body)),
  );
  await teller.name('photographer', findId, picture.taxon ?? 'Mycena acicula', {
    ...{ qualifier: 'cf.', confidence: 'fairly sure' },
    reason: 'Orange cap of less than 5 mm on a yellow stalk, on mossy bark; gills and spores not looked at.',
  });
}

async function unfinished(teller: DemoTeller): Promise<void> {
  const { clock, people } = teller;
  clock.pass(4);
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
}

/** The card of the camera comes in again: the tray says that these bytes are known. */
async function readTwice(teller: DemoTeller): Promise<void> {
  teller.clock.pass(7);
  await teller.upload(teller.people.photographer, [['heads-on-bark.jpg', 'CWSL2214 copy.JPG']]);
}
