import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  effect,
  type ElementRef,
  inject,
  input,
  output,
  untracked,
  viewChild,
} from '@angular/core';
import { Canvas, Circle, Ellipse, Polyline, type FabricObject } from 'fabric';
import type { Observable, Subscription } from 'rxjs';
import type { NoteGeometry } from '@shared/annotations/note';
import { px, type ImagePoint } from '@shared/geometry/points';
import { MARK, ON_INK } from '../../../ui/viewer/paint';
import type { Viewport } from '../../../ui/viewer/viewport';
import { handlesOf, linesOf, withHandle } from '../tools/handles';
import type { Preview } from '../tools/tool';
import { bodyEllipse } from './body-ellipse';

/** Radius of a handle as it is seen, and as it is taken, view px. */
const HANDLE = { seen: 4.5, mouse: 8, touch: 18 } as const;
const HEM_COLOUR = 'rgba(21, 19, 15, 0.72)';

/**
 * What is being drawn or changed just now: the selected note with its handles, and the tool's line. The
 * only holder of fabric; all other notes lie on the plain canvas beneath. Objects are in image pixels and
 * the viewport is fabric's own transform, so that nothing is converted by hand.
 */
@Component({
  selector: 'app-edited-note',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<canvas #element aria-hidden="true"></canvas>`,
  styles: `
    :host {
      position: absolute;
      inset: 0;
    }
  `,
})
export class EditedNote {
  readonly frames = input.required<Observable<Viewport>>();
  readonly viewport = input.required<Viewport | null>();
  /** the shape in hand; null for none */
  readonly geometry = input.required<NoteGeometry | null>();
  /** whether it may be changed */
  readonly held = input.required<boolean>();
  readonly preview = input.required<Preview>();
  /** the handle that the keyboard moves */
  readonly activeHandle = input<number | null>(null);
  readonly cursor = input('grab');

  /** while a handle is dragged, and null when it was let go */
  readonly reshaping = output<NoteGeometry | null>();
  readonly reshaped = output<NoteGeometry>();
  readonly handleTaken = output<number>();

  private readonly element = viewChild.required<ElementRef<HTMLCanvasElement>>('element');
  private canvas: Canvas | null = null;
  private drawings: FabricObject[] = [];
  private grips: Circle[] = [];
  /** the shape while a handle is in hand: the document changes only when it is let go */
  private live: NoteGeometry | null = null;

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      this.canvas = this.open();
      this.redraw();
    });
    destroyed.onDestroy(() => void this.canvas?.dispose());
    let following: Subscription | undefined;
    effect(() => {
      following?.unsubscribe();
      following = this.frames().subscribe((viewport) => this.draw(viewport));
    });
    destroyed.onDestroy(() => following?.unsubscribe());
    effect(() => {
      this.geometry();
      this.held();
      this.preview();
      this.activeHandle();
      const cursor = this.cursor();
      if (this.canvas) this.canvas.defaultCursor = cursor;
      untracked(() => this.redraw());
    });
  }

  /** Whether this pointer takes a handle, so that nothing else may begin with it. */
  takes(event: PointerEvent): boolean {
    if (!this.canvas || !this.held() || !this.geometry()) return false;
    this.resizeGrips(event.pointerType === 'touch' ? HANDLE.touch : HANDLE.mouse);
    const { target } = this.canvas.findTarget(event);
    return target !== undefined && this.grips.includes(target as Circle);
  }

  private open(): Canvas {
    const canvas = new Canvas(this.element().nativeElement, {
      enablePointerEvents: true,
      selection: false,
      skipOffscreen: false,
      renderOnAddRemove: false,
      preserveObjectStacking: true,
      defaultCursor: untracked(this.cursor),
    });
    canvas.on('mouse:down', ({ target }) => {
      const index = this.grips.indexOf(target as Circle);
      if (index >= 0) this.handleTaken.emit(index);
    });
    canvas.on('object:moving', ({ target }) => {
      const index = this.grips.indexOf(target as Circle);
      const shape = this.live ?? this.geometry();
      if (index < 0 || !shape) return;
      this.live = withHandle(shape, index, px(target.left, target.top));
      this.reshaping.emit(this.live);
      this.redraw();
    });
    canvas.on('object:modified', () => {
      const shape = this.live;
      this.live = null;
      this.reshaping.emit(null);
      if (shape) this.reshaped.emit(shape);
    });
    return canvas;
  }

  private redraw(): void {
    const viewport = untracked(this.viewport);
    if (viewport) this.draw(viewport);
  }

  private draw(viewport: Viewport): void {
    const { canvas } = this;
    if (!canvas) return;
    const { width, height } = viewport.size;
    if (canvas.width !== width || canvas.height !== height) canvas.setDimensions({ width, height });
    canvas.setViewportTransform(viewport.transform);
    const shape = this.live ?? untracked(this.geometry);
    canvas.remove(...this.drawings);
    this.drawings = [
      ...(shape ? shapeDrawings(shape, viewport.zoom) : []),
      ...previewDrawings(untracked(this.preview), viewport.zoom),
    ];
    this.placeGrips(canvas, shape, viewport.zoom);
    canvas.add(...this.drawings);
    // in this very frame: a request would come one frame after the picture
    canvas.renderAll();
  }

  private placeGrips(canvas: Canvas, shape: NoteGeometry | null, zoom: number): void {
    const points = shape && untracked(this.held) ? handlesOf(shape) : [];
    while (this.grips.length > points.length) canvas.remove(this.grips.pop() as Circle);
    while (this.grips.length < points.length) {
      const grip = new Circle({
        radius: HANDLE.mouse / zoom,
        fill: 'transparent',
        hasControls: false,
        hasBorders: false,
        hoverCursor: 'move',
        objectCaching: false,
        ...CENTRED,
      });
      this.grips.push(grip);
      canvas.add(grip);
    }
    const active = untracked(this.activeHandle);
    points.forEach(({ x, y }, i) => {
      const grip = this.grips[i] as Circle;
      grip.set({ left: x, top: y, radius: HANDLE.mouse / zoom });
      grip.setCoords();
      this.drawings.push(knob({ x, y }, zoom, i === active));
    });
  }

  private resizeGrips(radius: number): void {
    const zoom = untracked(this.viewport)?.zoom ?? 1;
    for (const grip of this.grips) {
      grip.set({ radius: radius / zoom });
      grip.setCoords();
    }
  }
}

const CENTRED = { originX: 'center', originY: 'center' } as const;
const INERT = { evented: false, selectable: false, objectCaching: false, fill: '' } as const;

function shapeDrawings(shape: NoteGeometry, zoom: number): FabricObject[] {
  const ellipse = bodyEllipse(shape);
  const rounds = ellipse
    ? [3, 1].map(
        (width) =>
          new Ellipse({
            ...INERT,
            ...CENTRED,
            left: ellipse.centre.x,
            top: ellipse.centre.y,
            rx: ellipse.along,
            ry: ellipse.across,
            angle: (ellipse.angle * 180) / Math.PI,
            stroke: width === 1 ? MARK : HEM_COLOUR,
            strokeWidth: width / zoom,
            opacity: 0.8,
          }),
      )
    : [];
  return [...rounds, ...linesOf(shape).flatMap((line) => hemmed(line, zoom, ON_INK))];
}

function previewDrawings(preview: Preview, zoom: number): FabricObject[] {
  return preview.lines.flatMap((line) => [
    ...(line.length > 1 ? hemmed(line, zoom, ON_INK) : []),
    ...line.slice(0, 1).map((point) => knob(point, zoom, false)),
  ]);
}

function hemmed(line: readonly ImagePoint[], zoom: number, colour: string): FabricObject[] {
  const points = line.map(({ x, y }) => ({ x, y }));
  return [4, 1.75].map(
    (width) =>
      new Polyline(points, {
        ...INERT,
        stroke: width === 4 ? HEM_COLOUR : colour,
        strokeWidth: width / zoom,
        strokeLineCap: 'round',
        strokeLineJoin: 'round',
      }),
  );
}

/** An open ring, so that the edge under it stays in sight. */
function knob({ x, y }: { readonly x: number; readonly y: number }, zoom: number, active: boolean): FabricObject {
  return new Circle({
    ...INERT,
    ...CENTRED,
    left: x,
    top: y,
    radius: (active ? HANDLE.seen + 2 : HANDLE.seen) / zoom,
    stroke: active ? ON_INK : MARK,
    strokeWidth: (active ? 2.5 : 1.5) / zoom,
  });
}
