import type { Segment } from '@shared/geometry/segment';
import { lineOf, NO_ENDS, stepEnds, type Ends } from './ends';
import { NOTHING_DRAWN, type Tool } from './tool';

/**
 * A body's length, then its width. The first line is a note of its own at once, with no width yet: it is
 * kept and undone by itself, and Escape after it leaves a body of which only the length is known.
 */
export type CrossState =
  | { readonly name: 'along'; readonly ends: Ends }
  | { readonly name: 'across'; readonly noteId: string; readonly along: Segment; readonly ends: Ends };

const START: CrossState = { name: 'along', ends: NO_ENDS };

export const alongThenAcrossTool: Tool<CrossState> = {
  id: 'along-then-across',
  start: START,
  step(state, input) {
    if (state.name === 'across' && input.type === 'cancel' && state.ends.name === 'none') return { state: START };
    const { ends, segment } = stepEnds(state.ends, input);
    if (!segment || input.type !== 'up') return { state: { ...state, ends } };
    if (state.name === 'along') {
      return {
        state: { name: 'across', noteId: input.newId, along: segment, ends: NO_ENDS },
        edit: { does: 'add', noteId: input.newId, geometry: { type: 'cross', along: segment, across: null } },
      };
    }
    const { noteId, along } = state;
    return { state: START, edit: { does: 'reshape', noteId, geometry: { type: 'cross', along, across: segment } } };
  },
  preview(state) {
    const line = lineOf(state.ends);
    if (state.name === 'along') return line ? { lines: [line] } : NOTHING_DRAWN;
    return { lines: line ? [line] : [], across: state.along };
  },
  awaits(state) {
    if (state.name === 'along') return state.ends.name === 'none' ? 'start' : 'end';
    return state.ends.name === 'none' ? 'across' : 'across-end';
  },
};
