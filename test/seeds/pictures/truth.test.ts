import { readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import exifr from 'exifr';
import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import type { TrueBody, TruePicture } from '../../../seeds/pictures/truth.js';

const room = new URL('../../../seeds/pictures/', import.meta.url);
const rendered = (file: string): string => fileURLToPath(new URL(`rendered/${file}`, room));

const truth = JSON.parse(await readFile(new URL('truth.json', room), 'utf8')) as Record<string, TruePicture>;

/** Brightness of a picture, and its value between pixels; the middle of the first pixel is (0.5, 0.5). */
interface Brightness {
  at(x: number, y: number): number;
}

async function brightness(file: string): Promise<Brightness> {
  const grey = sharp(rendered(file));
  const { channels } = await grey.metadata();
  const { data, info } = await (channels === 1 ? grey.toColourspace('grey16') : grey.toColourspace('rgb16'))
    .raw({ depth: 'ushort' })
    .toBuffer({ resolveWithObject: true });
  const values = new Uint16Array(data.buffer, data.byteOffset, data.length / 2);
  const pixel = (x: number, y: number): number => {
    const o =
      (Math.max(0, Math.min(info.height - 1, y)) * info.width + Math.max(0, Math.min(info.width - 1, x))) *
      info.channels;
    return info.channels === 1 ? values[o]! : (values[o]! + values[o + 1]! + values[o + 2]!) / 3;
  };
  return {
    at(x, y) {
      const fx = Math.floor(x - 0.5);
      const fy = Math.floor(y - 0.5);
      const u = x - 0.5 - fx;
      const v = y - 0.5 - fy;
      return (
        (pixel(fx, fy) * (1 - u) + pixel(fx + 1, fy) * u) * (1 - v) +
        (pixel(fx, fy + 1) * (1 - u) + pixel(fx + 1, fy + 1) * u) * v
      );
    },
  };
}

/** First place where a profile passes a level, between its samples. */
function crossing(profile: readonly number[], level: number): number | null {
  for (let i = 1; i < profile.length; i++) {
    const a = profile[i - 1]!;
    const b = profile[i]!;
    if (a > level !== b > level) return i - 1 + (a - level) / (a - b);
  }
  return null;
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;

describe('truth beside the rendered pictures', () => {
  it.each(Object.keys(truth))('gives the size of %s', async (file) => {
    const { width, height } = await sharp(rendered(file)).metadata();
    expect({ width, height }).toEqual({ width: truth[file]!.width, height: truth[file]!.height });
  });

  it.each(Object.keys(truth))('keeps the whole bodies of %s inside the picture', (file) => {
    const { width, height, bodies } = truth[file]!;
    for (const { center, cut } of bodies) {
      if (cut) continue;
      expect(center.x).toBeGreaterThan(0);
      expect(center.y).toBeGreaterThan(0);
      expect(center.x).toBeLessThan(width);
      expect(center.y).toBeLessThan(height);
    }
  });

  it.each(Object.keys(truth).filter((file) => truth[file]!.published))('keeps %s to the published sizes', (file) => {
    for (const { character, minUm, maxUm, source } of truth[file]!.published!) {
      expect(source).toMatch(/\d{4}/);
      const sizes = truth[file]!.bodies.flatMap((body) => sizeOf(character, body));
      expect(sizes.length).toBeGreaterThan(0);
      expect(Math.min(...sizes)).toBeGreaterThanOrEqual(minUm);
      expect(Math.max(...sizes)).toBeLessThanOrEqual(maxUm);
    }
  });

  it.each(Object.keys(truth).filter((file) => file.endsWith('.jpg')))(
    'says in %s when and with what it was taken',
    async (file) => {
      const notes = (await exifr.parse(rendered(file), { reviveValues: false })) as Record<string, unknown>;
      expect(notes).toMatchObject({ Make: 'Calder', OffsetTimeOriginal: '+00:00' });
      expect(notes['DateTimeOriginal']).toMatch(/^2025:11:0\d \d\d:\d\d:00$/);
    },
  );

  it.each(['heads-on-bark.jpg', 'millipede-uv.jpg'])(
    'puts %s into the open sea, on a sensor 23.5 mm wide',
    async (file) => {
      const gps = await exifr.gps(rendered(file));
      expect(gps.latitude).toBeCloseTo(56.5, 3);
      expect(gps.longitude).toBeCloseTo(3.2, 3);
      const notes = (await exifr.parse(rendered(file), { pick: ['FocalPlaneXResolution'] })) as Record<string, number>;
      expect((truth[file]!.width / notes['FocalPlaneXResolution']!) * 10).toBeCloseTo(23.5, 1);
    },
  );
});

function sizeOf(character: string, { kind, axesUm }: TrueBody): number[] {
  if (character === 'spore diameter' && kind === 'spore') return [axesUm.length, axesUm.width];
  if (character === 'spore length' && kind === 'spore') return [axesUm.length];
  if (character === 'spore width' && kind === 'spore') return [axesUm.width];
  if (character === 'elater width' && kind === 'thread') return [axesUm.width];
  if (character === 'total height' && kind === 'head') return [axesUm.length];
  if (character === 'cap diameter' && kind === 'cap') return [axesUm.width];
  return [];
}

describe('the stage micrometer', () => {
  const { graduations, umPerPxX } = truth['stage-micrometer.jpg']!;
  let picture: Brightness;
  beforeAll(async () => {
    picture = await brightness('stage-micrometer.jpg');
  });

  it('shows its lines where the truth says, within 0.3 px', () => {
    expect(graduations!.length).toBeGreaterThanOrEqual(9);
    for (const { a, b } of graduations!) {
      // Across the line at several heights; dust may spoil one of them.
      const offsets = [0.15, 0.25, 0.35, 0.45, 0.55, 0.65, 0.75].map((t) => {
        const x = a.x + (b.x - a.x) * t;
        const y = a.y + (b.y - a.y) * t;
        const length = Math.hypot(b.x - a.x, b.y - a.y);
        const across = { x: -(b.y - a.y) / length, y: (b.x - a.x) / length };
        const profile = Array.from({ length: 401 }, (_, i) => {
          const d = (i - 200) / 10;
          return picture.at(x + across.x * d, y + across.y * d);
        });
        const level = (Math.min(...profile) + median([...profile.slice(0, 40), ...profile.slice(-40)])) / 2;
        const left = crossing(profile, level)!;
        const right = profile.length - 1 - crossing([...profile].reverse(), level)!;
        return (left + right) / 2 / 10 - 20;
      });
      expect(Math.abs(median(offsets))).toBeLessThan(0.3);
    }
  });

  it('has lines 10 µm apart at its scale', () => {
    const [first, ...rest] = graduations!;
    for (const { a, positionUm } of rest) {
      const apart = Math.hypot(a.x - first!.a.x, a.y - first!.a.y) * umPerPxX;
      expect(apart).toBeCloseTo(positionUm - first!.positionUm, 3);
    }
  });
});

describe.each(['spores-clavata.tif', 'spores-ellipsoid.jpg'])('spores in focus in %s', (file) => {
  it('end where the truth says, within 0.3 px', async () => {
    const picture = await brightness(file);
    const { bodies, umPerPxX } = truth[file]!;
    const alone = bodies.filter((body) => !body.cut && !body.touching && Math.abs(body.focus) < 0.8);
    expect(alone.length).toBeGreaterThanOrEqual(3);
    const excess = alone.map((body) => meanEdge(picture, body, umPerPxX));
    expect(Math.abs(median(excess)), excess.join(' ')).toBeLessThan(0.3);
  });
});

/** How far outside the true outline the wall's outer flank is half as dark as the wall, px, median over directions. */
function meanEdge(picture: Brightness, body: TrueBody, umPerPx: number): number {
  const a = body.axesUm.length / 2 / umPerPx;
  const b = body.axesUm.width / 2 / umPerPx;
  const tilt = (body.angle * Math.PI) / 180;
  return median(
    Array.from({ length: 72 }, (_, k) => {
      const t = (k * 5 * Math.PI) / 180;
      const r = (a * b) / Math.hypot(b * Math.cos(t - tilt), a * Math.sin(t - tilt));
      const profile = Array.from({ length: 241 }, (_, i) => {
        const d = r + 12 - i / 10;
        return picture.at(body.center.x + d * Math.cos(t), body.center.y + d * Math.sin(t));
      });
      const level = (Math.min(...profile) + median(profile.slice(0, 30))) / 2;
      const place = crossing(profile, level);
      return place === null ? 99 : 12 - place / 10;
    }),
  );
}
