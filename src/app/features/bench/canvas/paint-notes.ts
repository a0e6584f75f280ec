import type { Note, NoteGeometry } from '@shared/annotations/note';
import { viewPx, type ImagePoint, type ViewPoint } from '@shared/geometry/points';
import { label, labelBox, MARK, ON_INK, overlaps, strokeHemmed, type Box } from '../../../ui/viewer/paint';
import type { Viewport } from '../../../ui/viewer/viewport';
import { linesOf } from '../tools/handles';
import { bodyEllipse } from './body-ellipse';
import { boundsOf } from './note-hits';

/** What stands beside a note: its number and words, or its size. Empty for no label. */
export interface PaintedNote {
  readonly note: Note;
  readonly words: readonly string[];
  /** pointed at, or selected: drawn stronger */
  readonly strong: boolean;
  /** its shape is drawn by the layer that edits it; only the label is drawn here */
  readonly edited: boolean;
}

/** View px between a label and what it belongs to. */
const APART = 9;
/** Half the stroke that closes a measured line at each end, view px. */
const END = 4;

/**
 * All notes that are not being edited, on one plain canvas: thousands of them cost two strokes.
 * @returns where the labels of pointers and rounds stand, so that they can be clicked
 */
export function paintNotes(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  notes: readonly PaintedNote[],
): ReadonlyMap<string, Box> {
  const seen = notes.filter(({ note }) => isSeen(note.geometry, viewport));
  const shapes = seen.filter(({ edited }) => !edited);
  // of a whole body at rest its ellipse tells enough; the two lines are faint, so that it can be seen itself
  const atRest = shapes.filter(({ note, strong }) => !strong && bodyEllipse(note.geometry) !== null);
  paintFaintly(context, viewport, atRest);
  paintEllipses(context, viewport, shapes);
  for (const strong of [false, true]) {
    const some = shapes.filter((one) => one.strong === strong && !atRest.includes(one));
    if (some.length === 0) continue;
    context.beginPath();
    for (const { note } of some) tracePath(context, viewport, note.geometry);
    strokeHemmed(context, strong ? 2.25 : 1.5, strong ? ON_INK : MARK);
  }
  for (const { note } of seen) if (note.geometry.type === 'pointer') paintArrow(context, viewport, note.geometry);
  return paintLabels(context, viewport, seen);
}

function paintFaintly(context: CanvasRenderingContext2D, viewport: Viewport, shapes: readonly PaintedNote[]): void {
  context.save();
  context.beginPath();
  for (const { note } of shapes) tracePath(context, viewport, note.geometry);
  context.globalAlpha = 0.5;
  context.lineWidth = 1;
  context.strokeStyle = MARK;
  context.stroke();
  context.restore();
}

function paintEllipses(context: CanvasRenderingContext2D, viewport: Viewport, shapes: readonly PaintedNote[]): void {
  context.beginPath();
  for (const { note } of shapes) traceEllipse(context, viewport, note.geometry);
  strokeHemmed(context, 1.25);
}

function traceEllipse(context: CanvasRenderingContext2D, viewport: Viewport, geometry: NoteGeometry): void {
  const ellipse = bodyEllipse(geometry);
  if (!ellipse) return;
  const { x, y } = viewport.toView(ellipse.centre);
  const [along, across] = [ellipse.along * viewport.zoom, ellipse.across * viewport.zoom];
  context.moveTo(x + along * Math.cos(ellipse.angle), y + along * Math.sin(ellipse.angle));
  context.ellipse(x, y, along, across, ellipse.angle, 0, 2 * Math.PI);
}

function tracePath(context: CanvasRenderingContext2D, viewport: Viewport, geometry: NoteGeometry): void {
  for (const line of linesOf(geometry)) {
    line.forEach((point, i) => {
      const { x, y } = viewport.toView(point);
      if (i === 0) context.moveTo(x, y);
      else context.lineTo(x, y);
    });
    if (geometry.type !== 'outline' && geometry.type !== 'pointer') traceEnds(context, viewport, line);
  }
}

/** Short strokes square to the line at its ends, so that an end can be told from the edge that it sits on. */
function traceEnds(context: CanvasRenderingContext2D, viewport: Viewport, line: readonly ImagePoint[]): void {
  const view = line.map((point) => viewport.toView(point));
  for (const [end, next] of [
    [view[0], view[1]],
    [view[view.length - 1], view[view.length - 2]],
  ] as const) {
    if (!end || !next) continue;
    const length = Math.hypot(next.x - end.x, next.y - end.y);
    if (length < END) continue;
    const [x, y] = [(-(next.y - end.y) / length) * END, ((next.x - end.x) / length) * END];
    context.moveTo(end.x - x, end.y - y);
    context.lineTo(end.x + x, end.y + y);
  }
}

function paintArrow(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  geometry: NoteGeometry & { type: 'pointer' },
): void {
  const [tip, tail] = [viewport.toView(geometry.at), viewport.toView(geometry.label)];
  const angle = Math.atan2(tail.y - tip.y, tail.x - tip.x);
  context.beginPath();
  context.moveTo(tip.x, tip.y);
  for (const side of [-0.38, 0.38]) {
    context.lineTo(tip.x + 11 * Math.cos(angle + side), tip.y + 11 * Math.sin(angle + side));
  }
  context.closePath();
  strokeHemmed(context, 1);
  context.fillStyle = MARK;
  context.fill();
}

function paintLabels(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  notes: readonly PaintedNote[],
): ReadonlyMap<string, Box> {
  const boxes = new Map<string, Box>();
  for (const { note, words, strong } of notes) {
    if (words.length === 0) continue;
    const { geometry } = note;
    const at =
      geometry.type === 'pointer'
        ? pointerLabel(context, viewport, geometry, words)
        : besideShape(context, viewport, geometry, words);
    boxes.set(note.id, label(context, words, at, strong));
  }
  return boxes;
}

/** On the far side of the tail's end, so that the label covers neither the line nor what it points at. */
function pointerLabel(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  geometry: NoteGeometry & { type: 'pointer' },
  words: readonly string[],
): ViewPoint {
  const [tip, tail] = [viewport.toView(geometry.at), viewport.toView(geometry.label)];
  const { width, height } = labelBox(context, words, tail);
  return viewPx(tail.x >= tip.x ? tail.x : tail.x - width, tail.y - height / 2);
}

/** Right of the shape, or where there is room: never on what is measured, never out of sight if it can be helped. */
function besideShape(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  geometry: NoteGeometry,
  words: readonly string[],
): ViewPoint {
  const { low, high } = boundsOf(geometry);
  const [from, to] = [viewport.toView(low), viewport.toView(high)];
  const shape: Box = { x: from.x, y: from.y, width: to.x - from.x, height: to.y - from.y };
  const { width, height } = labelBox(context, words, viewPx(0, 0));
  const middle = viewPx((from.x + to.x) / 2, (from.y + to.y) / 2);
  const places = [
    viewPx(to.x + APART, middle.y - height / 2),
    viewPx(from.x - APART - width, middle.y - height / 2),
    viewPx(middle.x - width / 2, from.y - APART - height),
    viewPx(middle.x - width / 2, to.y + APART),
  ];
  const { size } = viewport;
  const isIn = ({ x, y }: ViewPoint) =>
    x >= 4 && y >= 4 && x + width <= size.width - 4 && y + height <= size.height - 4;
  const inside = places.find((at) => isIn(at) && !overlaps({ ...at, width, height }, shape));
  if (inside) return inside;
  // the shape fills the view: a corner of the view is the least evil
  return viewPx(
    Math.max(4, Math.min(size.width - width - 4, to.x + APART)),
    Math.max(4, Math.min(size.height - height - 4, middle.y)),
  );
}

function isSeen(geometry: NoteGeometry, viewport: Viewport): boolean {
  const { low, high } = boundsOf(geometry);
  const [from, to] = [viewport.toView(low), viewport.toView(high)];
  const [left, right, top, bottom] = [
    Math.min(from.x, to.x),
    Math.max(from.x, to.x),
    Math.min(from.y, to.y),
    Math.max(from.y, to.y),
  ];
  return right >= -200 && bottom >= -50 && left <= viewport.size.width + 200 && top <= viewport.size.height + 50;
}

/** A cross-hair for the keyboard, open in the middle, and the line that is to be drawn across. */
export function paintCrosshair(context: CanvasRenderingContext2D, viewport: Viewport, at: ImagePoint): void {
  const { x, y } = viewport.toView(at);
  context.beginPath();
  for (const side of [-1, 1]) {
    context.moveTo(x + side * 5, y);
    context.lineTo(x + side * 22, y);
    context.moveTo(x, y + side * 5);
    context.lineTo(x, y + side * 22);
  }
  strokeHemmed(context, 1.5, ON_INK);
}

/** Square to a line through its middle, faint: a width that slants reads long. */
export function paintAcrossGuide(
  context: CanvasRenderingContext2D,
  viewport: Viewport,
  along: { readonly a: ImagePoint; readonly b: ImagePoint },
): void {
  const [a, b] = [viewport.toView(along.a), viewport.toView(along.b)];
  const [mx, my] = [(a.x + b.x) / 2, (a.y + b.y) / 2];
  const [dx, dy] = [(b.x - a.x) * 0.6, (b.y - a.y) * 0.6];
  context.save();
  context.beginPath();
  context.setLineDash([3, 5]);
  context.moveTo(mx - dy, my + dx);
  context.lineTo(mx + dy, my - dx);
  context.globalAlpha = 0.75;
  strokeHemmed(context, 1);
  context.restore();
}
