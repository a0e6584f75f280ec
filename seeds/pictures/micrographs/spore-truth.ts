import type { TrueBody } from '../truth.js';
import type { Frame } from './camera.js';
import type { Settled } from './scatter.js';

/** Spores that show in the frame, as truth; those that touch the border are marked as cut. */
export function sporeBodies(spores: readonly Settled[], frame: Frame, umPerPx: number): TrueBody[] {
  const id = (index: number): string => `s${index + 1}`;
  const place = spores.map((spore) => {
    const reach = spore.length / 2 / umPerPx;
    const x = spore.x - frame.left;
    const y = spore.y - frame.top;
    const shows = x > -reach && y > -reach && x < frame.width + reach && y < frame.height + reach;
    const whole = x > reach && y > reach && x < frame.width - reach && y < frame.height - reach;
    return { x, y, shows, whole };
  });
  return spores.flatMap((spore, i): TrueBody[] => {
    const { x, y, shows, whole } = place[i]!;
    if (!shows) return [];
    const near = spore.touching.filter((other) => place[other]!.shows);
    const covers = near.filter((other) => spores[other]!.height - spore.height > 1.5);
    return [
      {
        id: id(i),
        kind: 'spore',
        center: { x, y },
        axesUm: { length: spore.length, width: spore.width },
        angle: spore.angle % 180,
        focus: spore.height,
        ...(near.length ? { touching: near.map(id) } : {}),
        ...(covers.length ? { coveredBy: covers.map(id) } : {}),
        ...(whole ? {} : { cut: true }),
        edgeRule: 'outer flank of the wall where it is half as dark as the wall, ornament left out',
      },
    ];
  });
}
