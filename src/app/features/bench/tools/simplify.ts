import type { ImagePoint } from '@shared/geometry/points';
import { distanceToSegment } from '@shared/geometry/segment';

/** As many vertices as a note may have. */
const MOST_VERTICES = 2000;

/**
 * A traced line with as few vertices as keep it within `tolerance` of the trace. A hand's tremble makes a
 * trace read long; the corners that are left are where the hand truly turned.
 *
 * @param trace     2 or more points, image px
 * @param tolerance image px, positive
 * @see Douglas & Peucker 1973, Cartographica 10:112–122
 */
export function simplify(trace: readonly ImagePoint[], tolerance: number): readonly ImagePoint[] {
  const kept = keep(trace, tolerance);
  return kept.length > MOST_VERTICES ? simplify(kept, tolerance * 2) : kept;
}

function keep(trace: readonly ImagePoint[], tolerance: number): readonly ImagePoint[] {
  const kept = new Set([0, trace.length - 1]);
  const stretches: [number, number][] = [[0, trace.length - 1]];
  for (let stretch = stretches.pop(); stretch; stretch = stretches.pop()) {
    const [from, to] = stretch;
    const chord = { a: trace[from] as ImagePoint, b: trace[to] as ImagePoint };
    let farthest = -1;
    let distance = tolerance;
    for (let i = from + 1; i < to; i++) {
      const off = distanceToSegment(trace[i] as ImagePoint, chord);
      if (off > distance) [farthest, distance] = [i, off];
    }
    if (farthest < 0) continue;
    kept.add(farthest);
    stretches.push([from, farthest], [farthest, to]);
  }
  return trace.filter((_, i) => kept.has(i));
}
