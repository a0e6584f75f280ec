import { viewPx } from '@shared/geometry/points';
import { NO_GESTURE, stepGesture, type GestureAction, type GestureState, type PointerStep } from './gestures';

/** Fingers on a picture that draws with one of them, or pans. */
class Hand {
  state: GestureState = NO_GESTURE;
  readonly actions: GestureAction[] = [];

  constructor(private readonly intent: PointerStep['intent']) {}

  down(pointer: number, x: number, y: number): this {
    return this.step('down', pointer, x, y);
  }
  move(pointer: number, x: number, y: number): this {
    return this.step('move', pointer, x, y);
  }
  up(pointer: number, x: number, y: number): this {
    return this.step('up', pointer, x, y);
  }
  private step(type: PointerStep['type'], pointer: number, x: number, y: number): this {
    const step = stepGesture(this.state, { type, pointer, at: viewPx(x, y), intent: this.intent, slop: 4 });
    this.state = step.state;
    this.actions.push(...step.actions);
    return this;
  }
  get did(): string[] {
    return this.actions.map((action) => action.does);
  }
}

describe('gestures on a picture', () => {
  it('draws with one pointer', () => {
    const hand = new Hand('draw').down(1, 10, 20).move(1, 30, 20).up(1, 50, 25);
    expect(hand.actions).toEqual([
      { does: 'press', at: viewPx(10, 20) },
      { does: 'drag', at: viewPx(30, 20) },
      { does: 'release', at: viewPx(50, 25) },
    ]);
  });

  it('clicks when the pointer hardly moved, and pans when it did', () => {
    expect(new Hand('pan').down(1, 10, 10).move(1, 12, 11).up(1, 12, 11).actions).toEqual([
      { does: 'click', at: viewPx(10, 10) },
    ]);
    const panned = new Hand('pan').down(1, 10, 10).move(1, 20, 13).move(1, 25, 13).up(1, 25, 13);
    expect(panned.actions).toEqual([
      { does: 'pan', dx: 10, dy: 3 },
      { does: 'pan', dx: 5, dy: 0 },
    ]);
  });

  it('never clicks with the middle button', () => {
    expect(new Hand('pan-only').down(1, 10, 10).up(1, 10, 10).actions).toEqual([]);
  });

  it('takes back what one finger began when a second one comes, and zooms about their middle', () => {
    const hand = new Hand('draw').down(1, 100, 100).move(1, 104, 100).down(2, 204, 100).move(2, 304, 100);
    expect(hand.did).toEqual(['press', 'drag', 'abort', 'pan', 'zoom']);
    expect(hand.actions[4]).toEqual({ does: 'zoom', factor: 2, about: viewPx(204, 100) });
  });

  it('draws nothing with the finger that stays after a pinch', () => {
    const hand = new Hand('draw').down(1, 0, 0).down(2, 50, 0).up(2, 50, 0).move(1, 90, 90).up(1, 90, 90);
    expect(hand.did).toEqual(['press', 'abort']);
    expect(hand.state).toEqual(NO_GESTURE);
  });

  it('keeps the zoom finite when the fingers touch', () => {
    const hand = new Hand('pan').down(1, 10, 10).down(2, 10, 10).move(2, 10, 10).move(2, 20, 10);
    for (const action of hand.actions) if (action.does === 'zoom') expect(action.factor).toBeLessThanOrEqual(10);
  });
});
