import { distance, type ImagePoint } from '@shared/geometry/points';
import type { Segment } from '@shared/geometry/segment';
import type { ToolInput } from './tool';

/**
 * The two ends of one straight line, which several tools draw: by a drag from one to the other, or by a
 * click at each. The second way is for trackpads, tired hands and the keyboard.
 */
export type Ends =
  | { readonly name: 'none' }
  | { readonly name: 'dragging'; readonly from: ImagePoint; readonly to: ImagePoint }
  /** the first end was clicked; `to` follows the pointer */
  | { readonly name: 'placed'; readonly from: ImagePoint; readonly to: ImagePoint }
  /** the press that sets the second end */
  | { readonly name: 'placing'; readonly from: ImagePoint; readonly to: ImagePoint };

export const NO_ENDS: Ends = { name: 'none' };

export interface EndsStep {
  readonly ends: Ends;
  /** set once both ends are there and apart */
  readonly segment?: Segment;
}

export function stepEnds(ends: Ends, input: ToolInput): EndsStep {
  switch (input.type) {
    case 'cancel':
    case 'back':
      return { ends: NO_ENDS };
    case 'finish':
      return { ends };
    case 'abort':
      return { ends: ends.name === 'placing' ? { ...ends, name: 'placed' } : ends.name === 'placed' ? ends : NO_ENDS };
    case 'down':
      if (ends.name === 'none') return { ends: { name: 'dragging', from: input.at, to: input.at } };
      return { ends: { ...ends, name: 'placing', to: input.at } };
    case 'move':
      return { ends: ends.name === 'none' ? ends : { ...ends, to: input.at } };
    case 'up':
      return release(ends, input.at, input.slop);
  }
}

function release(ends: Ends, at: ImagePoint, slop: number): EndsStep {
  if (ends.name === 'none' || ends.name === 'placed') return { ends };
  const { from } = ends;
  if (distance(from, at) < slop) return { ends: { name: 'placed', from, to: at } };
  return { ends: NO_ENDS, segment: { a: from, b: at } };
}

/** The line so far. */
export function lineOf(ends: Ends): readonly ImagePoint[] | null {
  return ends.name === 'none' ? null : [ends.from, ends.to];
}
