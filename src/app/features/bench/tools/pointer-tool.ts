import { distance, px, type ImagePoint } from '@shared/geometry/points';
import { NOTHING_DRAWN, type Tool } from './tool';

export type PointerState =
  { readonly name: 'idle' } | { readonly name: 'pulling'; readonly at: ImagePoint; readonly label: ImagePoint };

const IDLE: PointerState = { name: 'idle' };
/** Where the words stand after a bare click, in multiples of a hand's unrest: up and to the right. */
const BESIDE = { x: 16, y: -10 } as const;

/** Points at something: a click, or a drag from the thing to where the words shall stand. */
export const pointerTool: Tool<PointerState> = {
  id: 'pointer',
  start: IDLE,
  step(state, input) {
    if (input.type === 'cancel' || input.type === 'abort' || input.type === 'back') return { state: IDLE };
    if (input.type === 'finish') return { state };
    if (state.name === 'idle') {
      return { state: input.type === 'down' ? { name: 'pulling', at: input.at, label: input.at } : IDLE };
    }
    if (input.type !== 'up') return { state: { ...state, label: input.at } };
    const { at } = state;
    const clicked = distance(at, input.at) < input.slop;
    const label = clicked ? px(at.x + BESIDE.x * input.slop, at.y + BESIDE.y * input.slop) : input.at;
    return { state: IDLE, edit: { does: 'add', noteId: input.newId, geometry: { type: 'pointer', at, label } } };
  },
  preview: (state) => (state.name === 'idle' ? NOTHING_DRAWN : { lines: [[state.at, state.label]] }),
  awaits: (state) => (state.name === 'idle' ? 'start' : 'end'),
};
