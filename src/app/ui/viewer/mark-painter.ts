import { px, viewPx, type ImagePoint } from '@shared/geometry/points';
import { rulingThrough, type RulingLine, type RulingMark } from './marks';
import { label, MARK, ON_INK, strokeHemmed } from './paint';
import type { Painter } from './picture-canvas';
import type { Viewport } from './viewport';

/** Half a mark's length across the ruling, view px. */
const HALF = 26;

/**
 * Marks as strokes across the ruling with an open middle, so that the graduation stays in sight; faint
 * strokes stand where the ones between should lie, which shows at a glance whether the numbers are right.
 */
export function paintMarks(marks: readonly RulingMark[], selected: number | null): Painter {
  return (context, viewport) => {
    const line = rulingThrough(marks);
    if (line) paintExpected(context, viewport, line, marks);
    marks.forEach((mark, place) => {
      const strong = place === selected;
      strokeAcross(context, viewport, line, mark.at, HALF, 5);
      strokeHemmed(context, strong ? 2.5 : 1.5, strong ? ON_INK : MARK);
      const { x, y } = viewport.toView(mark.at);
      const across = acrossRuling(viewport, line);
      label(
        context,
        [String(mark.index)],
        viewPx(x + across.x * (HALF + 6) - 8, y + across.y * (HALF + 6) - (across.y < -0.5 ? 22 : 0)),
        strong,
      );
    });
  };
}

function paintExpected(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  line: RulingLine,
  marks: readonly RulingMark[],
): void {
  const taken = new Set(marks.map((mark) => mark.index));
  const [first, last] = [Math.min(...taken), Math.max(...taken)];
  const apart = Math.hypot(line.step.x, line.step.y) * viewport.zoom;
  if (apart < 4) return; // closer than that they would be a grey band
  context.save();
  context.globalAlpha = 0.55;
  for (let index = first; index <= last; index++) {
    if (taken.has(index)) continue;
    const at = px(line.zero.x + index * line.step.x, line.zero.y + index * line.step.y);
    if (!viewport.shows(at, -HALF)) continue;
    strokeAcross(context, viewport, line, at, HALF / 2, 4);
    strokeHemmed(context, 1);
  }
  context.restore();
}

function strokeAcross(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  line: RulingLine | null,
  at: ImagePoint,
  half: number,
  gap: number,
): void {
  const { x, y } = viewport.toView(at);
  const across = acrossRuling(viewport, line);
  context.beginPath();
  for (const side of [-1, 1]) {
    context.moveTo(x + side * gap * across.x, y + side * gap * across.y);
    context.lineTo(x + side * half * across.x, y + side * half * across.y);
  }
}

/** Unit vector across the ruling on the screen, downwards where it can; upright while there is no ruling yet. */
function acrossRuling(viewport: Viewport, line: RulingLine | null): { x: number; y: number } {
  if (!line) return { x: 0, y: 1 };
  const [from, to] = [
    viewport.toView(line.zero),
    viewport.toView(px(line.zero.x + line.step.x, line.zero.y + line.step.y)),
  ];
  const along = { x: to.x - from.x, y: to.y - from.y };
  const length = Math.hypot(along.x, along.y);
  if (length === 0) return { x: 0, y: 1 };
  const across = { x: -along.y / length, y: along.x / length };
  return across.y < 0 || (across.y === 0 && across.x < 0) ? { x: -across.x, y: -across.y } : across;
}
