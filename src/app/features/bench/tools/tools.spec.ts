import { px } from '@shared/geometry/points';
import { alongThenAcrossTool } from './along-then-across';
import { drive } from './drive';
import { lineTool } from './line-tool';
import { outlineTool } from './outline-tool';
import { pathTool } from './path-tool';
import { pointerTool } from './pointer-tool';

const shapes = (run: { edits: readonly { geometry: unknown }[] }) => run.edits.map((edit) => edit.geometry);

describe('the line', () => {
  it('is added when the drag ends', () => {
    const run = drive(lineTool).down(px(10, 20)).move(px(60, 20)).up(px(70, 25));
    expect(shapes(run)).toEqual([{ type: 'line', a: px(10, 20), b: px(70, 25) }]);
    expect(run.state).toEqual(lineTool.start);
  });

  it('can be clicked end by end, and follows the pointer between', () => {
    const run = drive(lineTool).click(px(10, 20)).move(px(40, 50));
    expect(lineTool.preview(run.state).lines).toEqual([[px(10, 20), px(40, 50)]]);
    expect(shapes(run.click(px(42, 51)))).toEqual([{ type: 'line', a: px(10, 20), b: px(42, 51) }]);
  });

  it('is never without length', () => {
    expect(drive(lineTool).click(px(5, 5)).click(px(6, 5)).edits).toEqual([]);
  });

  it('is taken back by Escape and by a second finger', () => {
    for (const how of ['cancel', 'abort'] as const) {
      const run = drive(lineTool).down(px(10, 20)).move(px(60, 20)).tell(how).up(px(70, 25));
      expect(run.edits).toEqual([]);
    }
  });

  it('keeps its clicked first end when the second press is taken back', () => {
    const run = drive(lineTool).click(px(10, 20)).down(px(90, 20)).tell('abort').click(px(50, 20));
    expect(shapes(run)).toEqual([{ type: 'line', a: px(10, 20), b: px(50, 20) }]);
  });
});

describe('along, then across', () => {
  it('adds the length with the first drag and the width to the same note with the second', () => {
    const run = drive(alongThenAcrossTool).drag(px(0, 0), px(100, 10)).drag(px(50, -20), px(52, 30));
    const along = { a: px(0, 0), b: px(100, 10) };
    expect(run.edits).toEqual([
      { does: 'add', noteId: run.edits[0]?.noteId, geometry: { type: 'cross', along, across: null } },
      {
        does: 'reshape',
        noteId: run.edits[0]?.noteId,
        geometry: { type: 'cross', along, across: { a: px(50, -20), b: px(52, 30) } },
      },
    ]);
    expect(run.state).toEqual(alongThenAcrossTool.start);
  });

  it('begins a new body after Escape, and keeps the length that is there', () => {
    const run = drive(alongThenAcrossTool).drag(px(0, 0), px(100, 10)).tell('cancel').drag(px(200, 0), px(290, 0));
    expect(run.edits.map((edit) => edit.does)).toEqual(['add', 'add']);
  });

  it('gives up only the line in hand with the first Escape', () => {
    const run = drive(alongThenAcrossTool).drag(px(0, 0), px(100, 10)).click(px(50, -20)).tell('cancel');
    expect(alongThenAcrossTool.awaits(run.state)).toBe('across');
  });

  it('says what it waits for', () => {
    const run = drive(alongThenAcrossTool);
    const waits = () => alongThenAcrossTool.awaits(run.state);
    expect(waits()).toBe('start');
    run.click(px(0, 0));
    expect(waits()).toBe('end');
    run.click(px(90, 0));
    expect(waits()).toBe('across');
    run.click(px(45, -20));
    expect(waits()).toBe('across-end');
  });
});

describe('the path along a bend', () => {
  it('is traced in one go, without the tremble of the hand', () => {
    const run = drive(pathTool).down(px(0, 0));
    for (let x = 5; x <= 100; x += 5) run.move(px(x, x % 10 === 0 ? 0.4 : -0.4));
    for (let y = 5; y <= 80; y += 5) run.move(px(100, y));
    run.up(px(100, 82));
    expect(shapes(run)).toEqual([{ type: 'path', points: [px(0, 0), px(100, 0.4), px(100, 82)] }]);
  });

  it('is clicked point by point and ended by Enter', () => {
    const run = drive(pathTool).click(px(0, 0)).click(px(40, 10)).click(px(70, 50)).finish();
    expect(shapes(run)).toEqual([{ type: 'path', points: [px(0, 0), px(40, 10), px(70, 50)] }]);
  });

  it('is ended by a second click on its last point, as a double click makes it', () => {
    const run = drive(pathTool).click(px(0, 0)).click(px(40, 10)).click(px(41, 10));
    expect(shapes(run)).toEqual([{ type: 'path', points: [px(0, 0), px(40, 10)] }]);
  });

  it('gives its last point back', () => {
    const run = drive(pathTool)
      .click(px(0, 0))
      .click(px(40, 10))
      .click(px(999, 0))
      .tell('back')
      .click(px(70, 50))
      .finish();
    expect(shapes(run)).toEqual([{ type: 'path', points: [px(0, 0), px(40, 10), px(70, 50)] }]);
  });

  it('is nothing with one point only', () => {
    expect(drive(pathTool).click(px(0, 0)).finish().edits).toEqual([]);
  });
});

describe('the round', () => {
  it('closes where it began', () => {
    const run = drive(outlineTool).click(px(0, 0)).click(px(40, 0)).click(px(40, 30)).click(px(1, 1));
    expect(shapes(run)).toEqual([{ type: 'outline', points: [px(0, 0), px(40, 0), px(40, 30)] }]);
  });

  it('drops the last point of a trace that came back to the first', () => {
    const run = drive(outlineTool).down(px(0, 0)).move(px(40, 0)).move(px(40, 30)).up(px(1, 0));
    expect(shapes(run)).toEqual([{ type: 'outline', points: [px(0, 0), px(40, 0), px(40, 30)] }]);
  });

  it('is not done by a double click before it has an inside', () => {
    const run = drive(outlineTool).click(px(0, 0)).click(px(40, 0)).click(px(40, 0)).click(px(40, 30)).finish();
    expect(shapes(run)).toEqual([{ type: 'outline', points: [px(0, 0), px(40, 0), px(40, 30)] }]);
  });
});

describe('the pointer', () => {
  it('puts the words where the drag ended', () => {
    const run = drive(pointerTool).drag(px(30, 40), px(120, 10));
    expect(shapes(run)).toEqual([{ type: 'pointer', at: px(30, 40), label: px(120, 10) }]);
  });

  it('puts them beside the thing after a click', () => {
    const run = drive(pointerTool).click(px(30, 40));
    expect(shapes(run)).toEqual([{ type: 'pointer', at: px(30, 40), label: px(78, 10) }]);
  });
});
