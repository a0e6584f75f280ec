import { NOTHING_DRAWN, type Tool } from './tool';
import { chainOf, NO_VERTICES, stepVertices, type Vertices } from './vertices';

/** A length along a bend: traced in one go, or clicked point by point. */
export const pathTool: Tool<Vertices> = {
  id: 'path',
  start: NO_VERTICES,
  step(state, input) {
    const { vertices, points } = stepVertices(state, input, { fewest: 2, endsAt: 'last' });
    if (!points || !('newId' in input)) return { state: vertices };
    return { state: vertices, edit: { does: 'add', noteId: input.newId, geometry: { type: 'path', points } } };
  },
  preview(state) {
    const chain = chainOf(state);
    return chain.length > 0 ? { lines: [chain] } : NOTHING_DRAWN;
  },
  awaits: (state) => (state.name === 'none' ? 'start' : 'next-point'),
};
