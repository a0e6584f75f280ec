import type { ViewPoint } from '@shared/geometry/points';

/** Colours of what stands over a picture: legible on any ground. */
export const MARK = '#FFB88A';
export const HEM = 'rgb(21 19 15 / 72%)';
export const INK_GROUND = 'rgb(21 19 15 / 82%)';
export const ON_INK = '#FFF6EC';

/** Strokes the current path in the mark's colour over a dark hem, widths in view px. */
export function strokeHemmed(context: CanvasRenderingContext2D, width = 1.5, colour: string = MARK): void {
  context.lineCap = 'round';
  context.lineJoin = 'round';
  context.strokeStyle = HEM;
  context.lineWidth = width + 2;
  context.stroke();
  context.strokeStyle = colour;
  context.lineWidth = width;
  context.stroke();
}

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Words on an ink ground, in lines; returns the box that they take. `at` is the box's corner, view px. */
export function label(context: CanvasRenderingContext2D, lines: readonly string[], at: ViewPoint, strong = false): Box {
  const box = labelBox(context, lines, at, strong);
  context.fillStyle = INK_GROUND;
  context.fillRect(box.x, box.y, box.width, box.height);
  context.fillStyle = strong ? MARK : ON_INK;
  context.textBaseline = 'middle';
  lines.forEach((line, i) => context.fillText(line, box.x + PAD.x, box.y + PAD.y + LINE * (i + 0.5)));
  return box;
}

/** The box that these words take at a corner; sets the context's font. */
export function labelBox(
  context: CanvasRenderingContext2D,
  lines: readonly string[],
  at: ViewPoint,
  strong = false,
): Box {
  context.font = `${strong ? 600 : 500} 13px 'Source Sans 3 Variable', system-ui, sans-serif`;
  const widest = Math.max(0, ...lines.map((line) => context.measureText(line).width));
  return {
    x: Math.round(at.x),
    y: Math.round(at.y),
    width: Math.ceil(widest) + PAD.x * 2,
    height: lines.length * LINE + PAD.y * 2,
  };
}

const PAD = { x: 6, y: 3 } as const;
const LINE = 16;

export function overlaps(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;
}
