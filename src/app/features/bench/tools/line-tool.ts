import { lineOf, NO_ENDS, stepEnds, type Ends } from './ends';
import { NOTHING_DRAWN, type Tool } from './tool';

/** One straight line: a width across, or a length along. */
export const lineTool: Tool<Ends> = {
  id: 'line',
  start: NO_ENDS,
  step(state, input) {
    const { ends, segment } = stepEnds(state, input);
    if (!segment || input.type !== 'up') return { state: ends };
    return { state: ends, edit: { does: 'add', noteId: input.newId, geometry: { type: 'line', ...segment } } };
  },
  preview(state) {
    const line = lineOf(state);
    return line ? { lines: [line] } : NOTHING_DRAWN;
  },
  awaits: (state) => (state.name === 'none' ? 'start' : 'end'),
};
