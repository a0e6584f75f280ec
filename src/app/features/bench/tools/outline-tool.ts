import { NOTHING_DRAWN, type Tool } from './tool';
import { chainOf, NO_VERTICES, stepVertices, type Vertices } from './vertices';

/** A round about something that is to be spoken of: traced, or clicked corner by corner. */
export const outlineTool: Tool<Vertices> = {
  id: 'outline',
  start: NO_VERTICES,
  step(state, input) {
    const { vertices, points } = stepVertices(state, input, { fewest: 3, endsAt: 'first' });
    if (!points || !('newId' in input)) return { state: vertices };
    return { state: vertices, edit: { does: 'add', noteId: input.newId, geometry: { type: 'outline', points } } };
  },
  preview(state) {
    const chain = chainOf(state);
    return chain.length > 0 ? { lines: [chain] } : NOTHING_DRAWN;
  },
  awaits: (state) => (state.name === 'none' ? 'start' : 'next-point'),
};
