import { describe, expect, it } from 'vitest';
import { measureNote } from '../../../shared/annotations/measure.js';
import type { NoteGeometry } from '../../../shared/annotations/note.js';
import { px } from '../../../shared/geometry/points.js';
import type { Scale } from '../../../shared/scale/scale.js';
import { codeOf, expectClose } from '../../support/close.js';

const SCALE: Scale = { umPerPxX: 0.2, umPerPxY: 0.2, relativeUncertainty: 0.01, grounds: 'calibrated' };
const UNEQUAL: Scale = { ...SCALE, umPerPxX: 0.2, umPerPxY: 0.21 };
const LINE: NoteGeometry = { type: 'line', a: px(10, 20), b: px(310, 420) };
const CROSS: NoteGeometry = {
  type: 'cross',
  along: { a: px(100, 100), b: px(142, 100) },
  across: { a: px(120, 85), b: px(120, 115) },
};

describe('measuring a body', () => {
  it('takes a line as length or as width, as its structure is measured', () => {
    expect(measureNote(LINE, 'along', SCALE).dimensions).toMatchObject([{ dimension: 'length', px: 500, um: 100 }]);
    expect(measureNote(LINE, 'across', SCALE).dimensions).toMatchObject([{ dimension: 'width', px: 500, um: 100 }]);
  });

  it('weighs x and y each by its own scale', () => {
    // 300·0.20 and 400·0.21 µm
    expectClose(measureNote(LINE, 'along', UNEQUAL).dimensions[0]?.um, 103.2279, 1e-6);
  });

  it('adds the pointing of both ends to the scale', () => {
    // √2·0.5·0.2 µm and 1 % of 100 µm, JCGM 100:2008 §5.1.2
    expectClose(measureNote(LINE, 'along', SCALE).dimensions[0]?.u, Math.hypot(0.1414214, 1), 1e-7);
  });

  it('gives both dimensions of a cross and their ratio', () => {
    const body = measureNote(CROSS, 'along-then-across', SCALE);
    expect(body.dimensions.map(({ dimension, px: size }) => [dimension, size])).toEqual([
      ['length', 42],
      ['width', 30],
    ]);
    expectClose(body.dimensions[0]?.um, 8.4, 1e-12);
    expectClose(body.q, 1.4, 1e-12);
  });

  it('keeps the scale out of the uncertainty of Q and the pointing in', () => {
    // 8.4 and 6.0 µm, each 0.2 µm by pointing: u(Q) 0.0573488
    const pointing = 1 / Math.SQRT2;
    const body = measureNote(CROSS, 'along-then-across', SCALE, pointing);
    expectClose(body.qU, 2 * 0.0573488, 1e-6);
    const unsure = measureNote(CROSS, 'along-then-across', { ...SCALE, relativeUncertainty: 0.2 }, pointing);
    expect(unsure.qU).toBe(body.qU);
    const enlarged = measureNote(CROSS, 'along-then-across', { ...SCALE, umPerPxX: 0.202, umPerPxY: 0.202 }, pointing);
    expectClose(enlarged.q, 1.4, 1e-12);
  });

  it('does not swap a body that is broader than long', () => {
    const turned: NoteGeometry = { type: 'cross', along: CROSS.across!, across: CROSS.along };
    const body = measureNote(turned, 'along-then-across', SCALE);
    expect(body.dimensions.map(({ px: size }) => size)).toEqual([30, 42]);
    expectClose(body.q, 30 / 42, 1e-12);
  });

  it('leaves out a width that is not drawn yet', () => {
    const half: NoteGeometry = { ...CROSS, across: null };
    for (const geometry of [half, LINE]) {
      const body = measureNote(geometry, 'along-then-across', SCALE);
      expect(body.dimensions.map(({ dimension }) => dimension)).toEqual(['length']);
      expect(body).toMatchObject({ q: null, qU: null });
    }
  });

  it('measures pixels and ratios only without a scale', () => {
    const body = measureNote(CROSS, 'along-then-across', null);
    expect(body.dimensions[1]).toEqual({ dimension: 'width', px: 30, um: null, u: null });
    expectClose(body.q, 1.4, 1e-12);
  });

  it('follows a bend', () => {
    const stalk: NoteGeometry = { type: 'path', points: [px(0, 0), px(30, 40), px(30, 100)] };
    expect(measureNote(stalk, 'along-bend', SCALE).dimensions).toMatchObject([
      { dimension: 'length', px: 110, um: 22 },
    ]);
    expect(measureNote(LINE, 'along-bend', SCALE).dimensions).toMatchObject([{ dimension: 'length', px: 500 }]);
  });

  it('has no ratio to a width of nothing', () => {
    const flat: NoteGeometry = { ...CROSS, across: { a: px(5, 5), b: px(5, 5) } };
    expect(measureNote(flat, 'along-then-across', SCALE)).toMatchObject({ q: null, qU: null });
  });

  it('takes an end dragged onto the other for a line that is not drawn', () => {
    const line = (b: number) => measureNote({ type: 'line', a: px(10, 20), b: px(b, 20) }, 'along', null).dimensions;
    expect(line(10)).toEqual([]);
    expect(line(10 + 1e-14)).toEqual([]);
    expect(line(10.5)).toHaveLength(1);
  });

  it('refuses shapes that measure nothing', () => {
    const pointer: NoteGeometry = { type: 'pointer', at: px(1, 1), label: px(9, 9) };
    expect(codeOf(() => measureNote(pointer, 'along', SCALE))).toBe('wrong-shape');
    expect(codeOf(() => measureNote(CROSS, 'across', SCALE))).toBe('wrong-shape');
    expect(codeOf(() => measureNote({ type: 'path', points: [px(0, 0), px(9, 9)] }, 'across', SCALE))).toBe(
      'wrong-shape',
    );
  });
});
