import { distance, type ImagePoint } from '@shared/geometry/points';
import { simplify } from './simplify';
import type { ToolInput } from './tool';

/**
 * A chain of points, drawn in one trace or clicked point by point; paths and outlines share it. A trace
 * is done when the pointer is lifted; clicks are done by Enter, a double click, or a click on the end.
 */
export type Vertices =
  | { readonly name: 'none' }
  /** the pointer is down; `placed` were clicked before */
  | { readonly name: 'pressing'; readonly placed: readonly ImagePoint[]; readonly trace: readonly ImagePoint[] }
  /** between clicks; `next` follows the pointer */
  | { readonly name: 'placed'; readonly placed: readonly ImagePoint[]; readonly next: ImagePoint };

export const NO_VERTICES: Vertices = { name: 'none' };

export interface VerticesStep {
  readonly vertices: Vertices;
  /** set once the chain is done */
  readonly points?: readonly ImagePoint[];
}

export interface Chain {
  /** fewest points of a whole one */
  readonly fewest: number;
  /** a click on which of its points ends it */
  readonly endsAt: 'last' | 'first';
}

export function stepVertices(vertices: Vertices, input: ToolInput, chain: Chain): VerticesStep {
  const placed = vertices.name === 'none' ? [] : vertices.placed;
  switch (input.type) {
    case 'cancel':
      return { vertices: NO_VERTICES };
    case 'back':
      return { vertices: waiting(placed.slice(0, -1)) };
    case 'abort':
      return { vertices: vertices.name === 'pressing' ? waiting(placed) : vertices };
    case 'finish':
      return placed.length >= chain.fewest ? { vertices: NO_VERTICES, points: placed } : { vertices };
    case 'down':
      return { vertices: { name: 'pressing', placed, trace: [input.at] } };
    case 'move':
      if (vertices.name === 'pressing') return { vertices: { ...vertices, trace: [...vertices.trace, input.at] } };
      return { vertices: vertices.name === 'placed' ? { ...vertices, next: input.at } : vertices };
    case 'up':
      if (vertices.name !== 'pressing') return { vertices };
      return release(placed, [...vertices.trace, input.at], input.slop, chain);
  }
}

function release(
  placed: readonly ImagePoint[],
  trace: readonly ImagePoint[],
  slop: number,
  chain: Chain,
): VerticesStep {
  const start = trace[0] as ImagePoint;
  const traced = trace.some((point) => distance(point, start) >= slop);
  if (!traced) return click(placed, start, slop, chain);
  const points = [...placed, ...simplify(trace, slop / 3)];
  const first = points[0] as ImagePoint;
  // a round closes itself: its last point on the first would be a side without length
  if (chain.endsAt === 'first' && distance(points[points.length - 1] as ImagePoint, first) < slop) points.pop();
  return points.length >= chain.fewest ? { vertices: NO_VERTICES, points } : { vertices: waiting(points) };
}

function click(placed: readonly ImagePoint[], at: ImagePoint, slop: number, { fewest, endsAt }: Chain): VerticesStep {
  const last = placed[placed.length - 1];
  const end = endsAt === 'last' ? last : placed[0];
  const again = [end, last].some((point) => point !== undefined && distance(point, at) < slop);
  if (again && placed.length >= fewest) return { vertices: NO_VERTICES, points: placed };
  return { vertices: waiting(again ? placed : [...placed, at]) };
}

function waiting(placed: readonly ImagePoint[]): Vertices {
  const last = placed[placed.length - 1];
  return last ? { name: 'placed', placed, next: last } : NO_VERTICES;
}

/** The chain so far, with the pointer as its end. */
export function chainOf(vertices: Vertices): readonly ImagePoint[] {
  if (vertices.name === 'none') return [];
  return vertices.name === 'pressing' ? [...vertices.placed, ...vertices.trace] : [...vertices.placed, vertices.next];
}
