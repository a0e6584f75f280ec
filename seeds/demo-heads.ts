import { ENOUGH, Hand, measurable } from './demo-bodies.js';
import { at } from './demo-places.js';
import { calibrateBench, optics } from './demo-rigs.js';
import type { DemoTeller } from './demo-teller.js';
import { Random } from './pictures/random.js';

const HEADS = 'heads-on-bark.jpg';

/** Heads whose foot and tip are both in sight, by eye: most of the others stand with their feet behind a neighbour. */
const IN_SIGHT: readonly string[] = ['h3', 'h4', 'h7', 'h13', 'h17'];
/** Farther from the plane in focus nobody would set a mark. */
const SHARP_ENOUGH_UM = 1000;
/** A head that leans towards the lens looks shorter than it is: whoever measures leaves it out. */
const UPRIGHT_ENOUGH_UM = 2000;

/**
 * The main job end to end: field and bench, a calibration, two observers, a wrong name put right. Its pictures
 * come from one card and one bench session, that of the field last, so that it leads the gallery.
 */
export async function hemitrichia(teller: DemoTeller): Promise<void> {
  const { clock, people, rooms } = teller;
  clock.pass(6);
  const [spores, micrometer] = await teller.upload(people.photographer, [
    ['spores-clavata.tif', 'bench_0041.tif'],
    ['stage-micrometer.jpg', 'bench_0042.jpg'],
  ]);
  clock.pass(0.01);
  const [heads] = await teller.upload(people.photographer, [[HEADS, 'CWSL2214.JPG']]);
  const findId = await teller.make(people.photographer, {
    ...at('depot', clock.day(-3), 'decorticated birch sleeper, soft'),
    imageIds: [heads as string],
  });
  await describeHeads(teller, heads as string);
  await teller.name('photographer', findId, 'Trichia varia', {
    ...{ qualifier: '', confidence: 'a guess' },
    reason: 'By the look of it: yellow, in a row, on dead wood.',
  });
  await measureHeads(teller, heads as string);

  await rooms.finds.addObservation(findId, people.photographer, {
    ...{ kind: 'at the bench', observedOn: clock.day(-1), substrate: '' },
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
  await measureSpores(teller, spores as string);
  await pointAtHead(teller, heads as string);
  const right = await teller.name('identifier', findId, 'Hemitrichia clavata', {
    ...{ qualifier: '', confidence: 'certain' },
    reason: 'Stalked, with a deep cup left below; spores 8–9 µm, too small for Trichia varia, which has 12–14.',
  });
  clock.pass(1);
  await rooms.determinations.decide(findId, right);
}

async function describeHeads(teller: DemoTeller, imageId: string): Promise<void> {
  await teller.describe(imageId, {
    title: 'Yellow heads on a sleeper',
    altText: 'A row of yellow, pear-shaped heads on short dark stalks, each a few millimetres tall, on wet bark.',
    light: 'daylight',
  });
  const scale = optics(teller.truth(HEADS).umPerPxX, 0.6, 1);
  await teller.rooms.scales.set(teller.people.photographer, imageId, scale);
}

/** Heights from the foot of the stalk to the tip, of the heads near the plane in focus: the scale holds there. */
async function measureHeads(teller: DemoTeller, imageId: string): Promise<void> {
  const hand = new Hand(new Random(2200));
  const heads = measurable(teller.truth(HEADS), 'head', SHARP_ENOUGH_UM).filter(
    ({ id, seenLengthUm }) => IN_SIGHT.includes(id) && (seenLengthUm ?? 0) >= UPRIGHT_ENOUGH_UM,
  );
  const rules = { structure: 'other:total height', edgeRule: 'outer', ornamentIncluded: null } as const;
  const drawn = heads.map((body) => hand.upright(body));
  await teller.measure('photographer', imageId, rules, drawn);
}

/** By the finder, and a day later by the identifier, each with a hand of their own. */
async function measureSpores(teller: DemoTeller, imageId: string): Promise<void> {
  const rules = { structure: 'spore', edgeRule: 'outer', ornamentIncluded: false } as const;
  const picture = teller.truth('spores-clavata.tif');
  const bodies = measurable(picture, 'spore', 3.5).slice(0, ENOUGH);
  const imre = new Hand(new Random(2214));
  const first = bodies.map((body) => imre.cross(body, picture));
  await teller.measure('photographer', imageId, rules, first);
  teller.clock.pass(1);
  const maud = new Hand(new Random(41));
  const second = bodies.slice(0, 12).map((body) => maud.cross(body, picture));
  await teller.measure('identifier', imageId, rules, second);
}

async function pointAtHead(teller: DemoTeller, imageId: string): Promise<void> {
  const picture = teller.truth(HEADS);
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
