/**
 * Renders the demo's pictures and their truth.
 *
 * Usage: `npx tsx seeds/pictures/render.ts [name…]`; without names, all of them. `QUALITY` (a factor, 1 when unset)
 * scales the number of rays or directions of light; `WIDTH` narrows the macro photographs for a first look.
 */
import { mkdir } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { renderFingerBesideCap } from './scenes/finger-beside-cap.js';
import { renderHeadsOnBark } from './scenes/heads-on-bark.js';
import { renderMillipedeUv } from './scenes/millipede-uv.js';
import { renderMicrometer } from './micrographs/micrometer.js';
import { renderSporesClavata } from './micrographs/spores-clavata.js';
import { renderSporesEllipsoid } from './micrographs/spores-ellipsoid.js';
import { renderThreads } from './micrographs/threads.js';

const quality = Number(process.env['QUALITY'] ?? 1);
/** Narrower macro photographs, for a first look. */
const width = Number(process.env['WIDTH'] ?? 1600);

const PICTURES: Readonly<Record<string, () => Promise<void>>> = {
  'heads-on-bark': () => renderHeadsOnBark(Math.ceil(14 * quality), width),
  'finger-beside-cap': () => renderFingerBesideCap(Math.ceil(12 * quality), width),
  'millipede-uv': () => renderMillipedeUv(Math.ceil(14 * quality), width),
  'spores-clavata': () => renderSporesClavata(Math.ceil(40 * quality)),
  'spores-ellipsoid': () => renderSporesEllipsoid(Math.ceil(30 * quality)),
  'threads-dark-field': () => renderThreads(Math.ceil(28 * quality)),
  'stage-micrometer': () => renderMicrometer(Math.ceil(20 * quality)),
};

const names = process.argv.slice(2);
await mkdir(fileURLToPath(new URL('./rendered', import.meta.url)), { recursive: true });
for (const name of names.length ? names : Object.keys(PICTURES)) {
  const render = PICTURES[name];
  if (!render) throw new Error(`No picture “${name}”. There are: ${Object.keys(PICTURES).join(', ')}.`);
  const started = Date.now();
  await render();
  process.stdout.write(`${name}: ${((Date.now() - started) / 1000).toFixed(0)} s\n`);
}
