import {
  afterNextRender,
  ChangeDetectionStrategy,
  CSP_NONCE,
  Component,
  computed,
  DestroyRef,
  effect,
  type ElementRef,
  inject,
  input,
  output,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { toObservable } from '@angular/core/rxjs-interop';
import { EMPTY, switchMap, type Observable } from 'rxjs';
import { viewPx, type ImagePoint, type ViewPoint } from '@shared/geometry/points';
import { NO_GESTURE, stepGesture, type GestureAction, type GestureState, type PointerStep } from './gestures';
import { OpenPicture } from './open-picture';
import type { Viewport } from './viewport';
import { ZoomButtons } from './zoom-buttons';

/** What a hand did on the picture, in image pixels. */
export interface PictureGesture {
  readonly type: 'press' | 'drag' | 'release' | 'abort' | 'click' | 'hover';
  readonly at: ImagePoint;
  readonly view: ViewPoint;
  /** a hand's unrest, image px: nearer than that is the same place */
  readonly slop: number;
  readonly touch: boolean;
}

/** Draws over the picture, in view px of a context that is scaled for the screen. */
export type Painter = (context: CanvasRenderingContext2D, viewport: Viewport) => void;

const SLOP = { mouse: 3, touch: 9 } as const;
/** Zoom per pixel of a mouse wheel; a notch of 100 px is a third. Common practice, no source. */
const WHEEL = 0.0029;

/**
 * A deep-zoomed picture with one canvas over it. It knows pans, pinches and wheels, and hands on what one
 * pointer draws; what that means is its parent's business. Content is projected over the canvas.
 */
@Component({
  selector: 'app-picture-canvas',
  imports: [ZoomButtons],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './picture-canvas.html',
  styleUrl: './picture-canvas.scss',
  host: { '[attr.data-drawn]': 'drawn() ? "" : null' },
})
export class PictureCanvas {
  readonly imageId = input.required<string>();
  readonly revision = input.required<number>();
  /** upright pixels of the original */
  readonly width = input.required<number>();
  readonly height = input.required<number>();
  /** what a screen reader calls it */
  readonly label = input.required<string>();
  /** Paints what lies over the picture; a new function repaints. */
  readonly painter = input<Painter>(() => undefined);
  /** Whether a pointer that goes down here draws; otherwise it pans, and a click is handed on. */
  readonly drawsAt = input<(at: ImagePoint, slop: number) => boolean>(() => false);
  /** Whether what is projected takes this pointer itself (a handle). */
  readonly leaves = input<(event: PointerEvent) => boolean>(() => false);
  readonly cursor = input('grab');
  /** Space is held: a drag pans whatever tool there is. */
  readonly panning = input(false);

  readonly gestured = output<PictureGesture>();

  private readonly surface = viewChild.required<ElementRef<HTMLElement>>('surface');
  private readonly tiles = viewChild.required<ElementRef<HTMLElement>>('tiles');
  private readonly overlay = viewChild.required<ElementRef<HTMLCanvasElement>>('overlay');

  private readonly nonce = inject(CSP_NONCE, { optional: true });
  private readonly ready = signal(false);
  private readonly picture = signal<OpenPicture | null>(null);
  readonly viewport = computed(() => this.picture()?.viewport() ?? null);
  readonly drawn = computed(() => this.picture()?.drawn() ?? false);
  readonly failed = computed(() => this.picture()?.failed() ?? false);

  private state: GestureState = NO_GESTURE;

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      this.listen(this.surface().nativeElement);
      const watch = new ResizeObserver(() => this.fitToWholePixels());
      watch.observe(this.surface().nativeElement.parentElement as HTMLElement);
      destroyed.onDestroy(() => watch.disconnect());
      this.fitToWholePixels();
      this.ready.set(true);
    });
    destroyed.onDestroy(() => this.picture()?.close());
    effect(() => {
      const [imageId, revision] = [this.imageId(), this.revision()];
      const [width, height] = [untracked(this.width), untracked(this.height)];
      if (this.ready()) untracked(() => this.open({ imageId, revision, width, height }));
    });
    effect(() => {
      const painter = this.painter();
      const viewport = untracked(this.viewport);
      if (viewport) this.paint(painter, viewport);
    });
  }

  /** Each drawn frame, for what is projected over the picture. */
  readonly frames: Observable<Viewport> = toObservable(this.picture).pipe(
    switchMap((picture) => picture?.frames ?? EMPTY),
  );

  focus(): void {
    this.surface().nativeElement.focus({ preventScroll: true });
  }
  get hasFocus(): boolean {
    const surface = this.surface().nativeElement;
    return surface.ownerDocument.activeElement === surface;
  }

  zoomBy(factor: number): void {
    this.picture()?.zoomBy(factor, null, true);
  }
  fit(): void {
    this.picture()?.fit();
  }
  oneToOne(): void {
    this.picture()?.zoomTo(1);
  }
  panBy(dx: number, dy: number): void {
    this.picture()?.panBy(dx, dy);
  }
  /** Brings a point into sight, if it isn't. */
  reveal(point: ImagePoint): void {
    if (!this.viewport()?.shows(point, 40)) this.picture()?.centreOn(point);
  }
  /** What stands on the screen there, for a loupe. */
  get pixels(): HTMLCanvasElement | null {
    return this.picture()?.pixels ?? null;
  }

  private open(source: { imageId: string; revision: number; width: number; height: number }): void {
    this.picture()?.close();
    const element = this.tiles().nativeElement;
    element.replaceChildren();
    const calm = element.ownerDocument.defaultView?.matchMedia('(prefers-reduced-motion: reduce)').matches ?? false;
    const picture = new OpenPicture(element, source, calm, this.nonce);
    picture.frames.subscribe((viewport) => this.paint(this.painter(), viewport));
    this.state = NO_GESTURE;
    this.picture.set(picture);
  }

  /** Half a CSS pixel of rest would put the overlay off by as much: the viewer counts whole ones. */
  private fitToWholePixels(): void {
    const surface = this.surface().nativeElement;
    const place = surface.parentElement?.getBoundingClientRect();
    if (!place) return;
    surface.style.width = `${Math.floor(place.width)}px`;
    surface.style.height = `${Math.floor(place.height)}px`;
  }

  private paint(painter: Painter, viewport: Viewport): void {
    const canvas = this.overlay().nativeElement;
    const context = canvas.getContext('2d');
    if (!context) return;
    const density = canvas.ownerDocument.defaultView?.devicePixelRatio ?? 1;
    const [width, height] = [Math.round(viewport.size.width * density), Math.round(viewport.size.height * density)];
    if (canvas.width !== width || canvas.height !== height) Object.assign(canvas, { width, height });
    context.setTransform(density, 0, 0, density, 0, 0);
    context.clearRect(0, 0, viewport.size.width, viewport.size.height);
    painter(context, viewport);
  }

  private listen(surface: HTMLElement): void {
    // in the capture phase, so that panning is decided before a projected canvas hears of the pointer
    const listen = <K extends keyof HTMLElementEventMap>(type: K, hear: (event: HTMLElementEventMap[K]) => void) =>
      surface.addEventListener(type, hear, { capture: true, passive: false });
    listen('pointerdown', (event) => this.pointerDown(event));
    listen('pointermove', (event) => this.pointerStep('move', event));
    listen('pointerup', (event) => this.pointerStep('up', event));
    listen('pointercancel', (event) => this.pointerStep('cancel', event));
    listen('wheel', (event) => this.wheel(event));
  }

  private pointerDown(event: PointerEvent): void {
    if ((event.target as Element).closest('button')) return;
    if (event.button === 2) return;
    // whoever takes the pointer, the keyboard goes where the hand is
    this.focus();
    const plain = event.button === 0 && !this.panning();
    if (plain && this.state.name === 'idle' && this.leaves()(event)) return;
    event.stopPropagation();
    event.preventDefault(); // a middle click would start the browser's own scrolling
    try {
      this.surface().nativeElement.setPointerCapture(event.pointerId);
    } catch {
      // The pointer is gone already (a very short touch); its `up` is heard all the same.
    }
    this.pointerStep('down', event);
  }

  private pointerStep(type: PointerStep['type'], event: PointerEvent): void {
    const at = this.viewPoint(event);
    const touch = event.pointerType === 'touch';
    const slop = touch ? SLOP.touch : SLOP.mouse;
    const step = stepGesture(this.state, {
      type,
      pointer: event.pointerId,
      at,
      slop,
      intent: this.intent(event, at, slop),
    });
    const busy = this.state.name !== 'idle' || step.state.name !== 'idle';
    this.state = step.state;
    if (busy && type !== 'down') event.stopPropagation();
    for (const action of step.actions) this.act(action, slop, touch);
  }

  private intent(event: PointerEvent, at: ViewPoint, slop: number): PointerStep['intent'] {
    if (event.button === 1 || this.panning()) return 'pan-only';
    const viewport = this.viewport();
    return viewport && this.drawsAt()(viewport.toImage(at), viewport.toImageLength(slop)) ? 'draw' : 'pan';
  }

  private act(action: GestureAction, slop: number, touch: boolean): void {
    if (action.does === 'pan') this.picture()?.panBy(action.dx, action.dy);
    else if (action.does === 'zoom') this.picture()?.zoomBy(action.factor, action.about, false);
    else {
      const viewport = this.viewport();
      if (!viewport) return;
      const at = viewport.toImage(action.at);
      this.gestured.emit({ type: action.does, at, view: action.at, slop: viewport.toImageLength(slop), touch });
    }
  }

  private wheel(event: WheelEvent): void {
    event.preventDefault();
    event.stopPropagation();
    const lines = event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 16 : 1;
    // a trackpad's pinch arrives as a wheel with Ctrl, in small numbers
    const pinch = event.ctrlKey ? 4 : 1;
    const factor = Math.exp(-event.deltaY * lines * pinch * WHEEL);
    this.picture()?.zoomBy(factor, this.viewPoint(event), true);
  }

  private viewPoint(event: MouseEvent): ViewPoint {
    const box = this.surface().nativeElement.getBoundingClientRect();
    return viewPx(event.clientX - box.left, event.clientY - box.top);
  }
}
