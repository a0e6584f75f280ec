import { distance, type ViewPoint } from '@shared/geometry/points';

/**
 * What fingers and mouse mean on a picture, as a state machine without a browser: one pointer draws or
 * pans, two pan and zoom. A second finger takes back what the first began to draw, so that nobody draws
 * by pinching.
 */
export type GestureState =
  | { readonly name: 'idle' }
  /** `far` once it has left the slop: until then it may become a click */
  | {
      readonly name: 'panning';
      readonly pointer: number;
      readonly from: ViewPoint;
      readonly last: ViewPoint;
      readonly far: boolean;
      readonly clicks: boolean;
    }
  | { readonly name: 'drawing'; readonly pointer: number; readonly at: ViewPoint }
  | { readonly name: 'pinching'; readonly one: Finger; readonly other: Finger }
  /** after a pinch, until the last finger is lifted: it must not draw a stray line */
  | { readonly name: 'spent'; readonly pointer: number };

interface Finger {
  readonly pointer: number;
  readonly at: ViewPoint;
}

export interface PointerStep {
  readonly type: 'down' | 'move' | 'up' | 'cancel';
  readonly pointer: number;
  readonly at: ViewPoint;
  /** for `down`: what one pointer does from here on */
  readonly intent: 'draw' | 'pan' | 'pan-only';
  /** a hand's unrest, view px: less than that is a click */
  readonly slop: number;
}

export type GestureAction =
  | { readonly does: 'press' | 'drag' | 'release' | 'abort' | 'click' | 'hover'; readonly at: ViewPoint }
  | { readonly does: 'pan'; readonly dx: number; readonly dy: number }
  | { readonly does: 'zoom'; readonly factor: number; readonly about: ViewPoint };

export interface GestureStep {
  readonly state: GestureState;
  readonly actions: readonly GestureAction[];
}

export const NO_GESTURE: GestureState = { name: 'idle' };

export function stepGesture(state: GestureState, input: PointerStep): GestureStep {
  switch (state.name) {
    case 'idle':
      return fromIdle(input);
    case 'panning':
      return whilePanning(state, input);
    case 'drawing':
      return whileDrawing(state, input);
    case 'pinching':
      return whilePinching(state, input);
    case 'spent':
      return isEnd(input) && input.pointer === state.pointer ? still(NO_GESTURE) : still(state);
  }
}

function fromIdle(input: PointerStep): GestureStep {
  const { pointer, at } = input;
  if (input.type === 'move') return { state: NO_GESTURE, actions: [{ does: 'hover', at }] };
  if (input.type !== 'down') return still(NO_GESTURE);
  if (input.intent === 'draw') return { state: { name: 'drawing', pointer, at }, actions: [{ does: 'press', at }] };
  return still({ name: 'panning', pointer, from: at, last: at, far: false, clicks: input.intent === 'pan' });
}

function whilePanning(state: GestureState & { name: 'panning' }, input: PointerStep): GestureStep {
  if (input.type === 'down') return still(pinch({ pointer: state.pointer, at: state.last }, input));
  if (input.pointer !== state.pointer) return still(state);
  if (input.type === 'cancel') return still(NO_GESTURE);
  if (input.type === 'up') {
    return { state: NO_GESTURE, actions: state.far || !state.clicks ? [] : [{ does: 'click', at: state.from }] };
  }
  const far = state.far || distance(state.from, input.at) > input.slop;
  if (!far) return still(state);
  return {
    state: { ...state, last: input.at, far },
    actions: [{ does: 'pan', dx: input.at.x - state.last.x, dy: input.at.y - state.last.y }],
  };
}

function whileDrawing(state: GestureState & { name: 'drawing' }, input: PointerStep): GestureStep {
  const { at } = input;
  if (input.type === 'down') {
    return { state: pinch(state, input), actions: [{ does: 'abort', at }] };
  }
  if (input.pointer !== state.pointer) return still(state);
  if (input.type === 'cancel') return { state: NO_GESTURE, actions: [{ does: 'abort', at }] };
  if (input.type === 'up') return { state: NO_GESTURE, actions: [{ does: 'release', at }] };
  return { state: { ...state, at }, actions: [{ does: 'drag', at }] };
}

function whilePinching(state: GestureState & { name: 'pinching' }, input: PointerStep): GestureStep {
  const { one, other } = state;
  const [moved, fixed] = input.pointer === one.pointer ? [one, other] : [other, one];
  if (input.pointer !== moved.pointer || input.type === 'down') return still(state);
  if (isEnd(input)) return still({ name: 'spent', pointer: fixed.pointer });
  const next: Finger = { pointer: moved.pointer, at: input.at };
  // fingers that touch are a pixel apart: a zoom by nothing or by infinity would lose the picture
  const [before, after] = [distance(fixed.at, moved.at), distance(fixed.at, input.at)];
  return {
    state: { name: 'pinching', one: fixed, other: next },
    actions: [
      { does: 'pan', dx: (input.at.x - moved.at.x) / 2, dy: (input.at.y - moved.at.y) / 2 },
      { does: 'zoom', factor: Math.max(1, after) / Math.max(1, before), about: middle(fixed.at, input.at) },
    ],
  };
}

function pinch({ pointer, at }: Finger, input: PointerStep): GestureState {
  return { name: 'pinching', one: { pointer, at }, other: { pointer: input.pointer, at: input.at } };
}

function middle(a: ViewPoint, b: ViewPoint): ViewPoint {
  return { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2, space: 'view' };
}

const isEnd = (input: PointerStep): boolean => input.type === 'up' || input.type === 'cancel';
const still = (state: GestureState): GestureStep => ({ state, actions: [] });
