import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
  viewChild,
} from '@angular/core';
import type { Note, NoteGeometry } from '@shared/annotations/note';
import { midpoint, px, type ImagePoint, type ViewPoint } from '@shared/geometry/points';
import type { ImageView } from '@shared/contracts/images';
import { SessionStore } from '../../core/session-store';
import { ScaleBar } from '../../ui/scale-bar/scale-bar';
import { Loupe } from '../../ui/viewer/loupe';
import type { Box } from '../../ui/viewer/paint';
import { PictureCanvas, type Painter, type PictureGesture } from '../../ui/viewer/picture-canvas';
import { BenchStore } from './bench-store';
import { EditedNote } from './canvas/edited-note';
import { boundsOf, noteAt } from './canvas/note-hits';
import { paintAcrossGuide, paintCrosshair, paintNotes, type PaintedNote } from './canvas/paint-notes';
import { measureWords } from './measure-words';
import { NoteStore } from './note-store';
import { labelLines, saidNotes } from './said-notes';
import { ToolDesk } from './tool-desk';
import { handlesOf, shifted, withHandle } from './tools/handles';

/** How far from a note's line a click still means it, in multiples of a hand's unrest. */
const REACH = 2.5;

/** The picture with everything on it: notes, what is being drawn, the live bar. */
@Component({
  selector: 'app-bench-picture',
  imports: [PictureCanvas, EditedNote, ScaleBar, Loupe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './bench-picture.html',
  styles: `
    :host {
      display: grid;
      min-width: 0;
      min-height: 0;
    }
  `,
})
export class BenchPicture {
  private readonly bench = inject(BenchStore);
  private readonly notes = inject(NoteStore);
  private readonly me = inject(SessionStore).user;
  protected readonly desk = inject(ToolDesk);

  readonly image = input.required<ImageView>();
  /** Space is held */
  readonly panning = input(false);
  /** a note on the picture was clicked */
  readonly chosen = output<Note>();

  readonly canvas = viewChild.required(PictureCanvas);
  private readonly layer = viewChild.required(EditedNote);

  private readonly hovered = signal<string | null>(null);
  private readonly live = signal<NoteGeometry | null>(null);
  protected readonly underFinger = signal<ViewPoint | null>(null);
  /** a signal of its own: a note that changes its shape is still the same one */
  private readonly selectedId = computed(() => this.notes.selected()?.id ?? null);
  /** the handle that arrows move; another note begins without */
  readonly handle = linkedSignal<string | null, number | null>({
    source: this.selectedId,
    computation: () => null,
  });

  /** whether the selected note is one's own to change */
  readonly held = computed(() => {
    const note = this.notes.selected();
    return (
      this.desk.reference() !== null || (note !== null && this.bench.mayAnnotate() && note.layer === this.me()?.id)
    );
  });
  /** what has handles: the reference that a scale is being set by, else the selected note */
  readonly edited = computed<NoteGeometry | null>(() => {
    const reference = this.desk.reference();
    if (reference) return { type: 'line', ...reference };
    return this.live() ?? this.notes.selected()?.geometry ?? null;
  });
  protected readonly cursor = computed(() => (this.desk.activity() ? 'crosshair' : 'grab'));
  protected readonly draws = () => this.desk.activity() !== null;
  protected readonly takesHandle = (event: PointerEvent) => !this.desk.busy() && this.layer().takes(event);

  private readonly painted = computed<readonly PaintedNote[]>(() => {
    const selected = this.notes.selected()?.id ?? null;
    const hovered = this.hovered();
    const numbers = new Map(saidNotes(this.notes.notes()).map(({ note, number }) => [note.id, number]));
    return this.notes.notes().map((note) => {
      const strong = note.id === selected || note.id === hovered;
      const edited = note.id === selected && this.desk.reference() === null;
      const shown = edited ? { ...note, geometry: this.live() ?? note.geometry } : note;
      const number = numbers.get(note.id);
      const words = number !== undefined ? labelLines(number, note.text) : strong ? this.sizeOf(shown) : [];
      return { note: shown, words, strong, edited };
    });
  });
  private labels: ReadonlyMap<string, Box> = new Map();
  protected readonly painter = computed<Painter>(() => {
    const painted = this.painted();
    const crosshair = this.desk.crosshair();
    const { across } = this.desk.preview();
    return (context, viewport) => {
      if (across) paintAcrossGuide(context, viewport, across);
      this.labels = paintNotes(context, viewport, painted);
      if (crosshair) paintCrosshair(context, viewport, crosshair);
    };
  });
  /** the bar's scale in pixels of the screen: it is then a quarter of the view at most, at every zoom */
  protected readonly barScale = computed(() => {
    const [scale, viewport] = [this.bench.scale(), this.canvas().viewport()];
    if (!scale || !viewport) return null;
    return { ...scale, umPerPxX: scale.umPerPxX / viewport.zoom, umPerPxY: scale.umPerPxY / viewport.zoom };
  });
  protected readonly viewWidth = computed(() => this.canvas().viewport()?.size.width ?? null);
  protected readonly pixels = computed(() => (this.underFinger() ? this.canvas().pixels : null));
  /** said to screen readers: the size of what is selected, as it changes */
  readonly spoken = computed(() => {
    const note = this.notes.selected();
    return note ? this.sizeOf(note).join(', ') : '';
  });

  protected gesture(gesture: PictureGesture): void {
    const { type, at, slop, touch, view } = gesture;
    this.underFinger.set(touch && (type === 'press' || type === 'drag') ? view : null);
    this.desk.crosshair.set(null);
    if (type === 'press') this.desk.point('down', at, slop);
    else if (type === 'release') this.desk.point('up', at, slop);
    else if (type === 'abort') this.desk.tell('abort');
    else if (type === 'click') this.click(at, view, slop);
    else {
      if (this.desk.activity()) this.desk.point('move', at, slop);
      if (type === 'hover') this.hovered.set(this.noteUnder(at, view, slop)?.id ?? null);
    }
  }

  protected unhover(): void {
    this.hovered.set(null);
  }

  protected reshape(geometry: NoteGeometry): void {
    const note = this.notes.selected();
    if (this.desk.reference() && geometry.type === 'line') this.desk.reference.set({ a: geometry.a, b: geometry.b });
    else if (note) this.notes.reshape(note.id, geometry);
  }

  protected reshaping(geometry: NoteGeometry | null): void {
    if (!this.desk.reference()) this.live.set(geometry);
  }

  /** Moves the handle in hand, or the whole note, by image px. What is moved is kept when the key is let go. */
  nudge(dx: number, dy: number): void {
    const shape = this.edited();
    if (!shape || !this.held() || this.desk.reference()) return;
    const index = this.handle();
    const point = index === null ? undefined : handlesOf(shape)[index];
    this.live.set(
      point && index !== null ? withHandle(shape, index, px(point.x + dx, point.y + dy)) : shifted(shape, dx, dy),
    );
  }

  /** Keeps what was nudged, as one edit. */
  keepNudge(): void {
    const [note, shape] = [this.notes.selected(), this.live()];
    this.live.set(null);
    if (note && shape) this.notes.reshape(note.id, shape);
  }

  /** Brings a shape into sight. */
  reveal(geometry: NoteGeometry): void {
    const { low, high } = boundsOf(geometry);
    this.canvas().reveal(midpoint(low, high));
  }

  nextHandle(): void {
    const shape = this.edited();
    if (!shape || !this.held()) return;
    const count = handlesOf(shape).length;
    this.handle.update((index) => (index === null ? 0 : index + 1 < count ? index + 1 : null));
  }

  private click(at: ImagePoint, view: ViewPoint, slop: number): void {
    const note = this.noteUnder(at, view, slop);
    this.notes.select(note?.id ?? null);
    if (note) this.chosen.emit(note);
  }

  private noteUnder(at: ImagePoint, { x, y }: ViewPoint, slop: number): Note | null {
    for (const [id, box] of this.labels) {
      const on = x >= box.x && y >= box.y && x <= box.x + box.width && y <= box.y + box.height;
      const note = on ? this.notes.doc().get(id) : undefined;
      if (note && note.kind !== 'measure') return note;
    }
    return noteAt(this.notes.notes(), at, slop * REACH);
  }

  private sizeOf(note: Note): readonly string[] {
    return note.kind === 'measure' ? measureWords(note.geometry, this.bench.structureOf(note), this.bench.scale()) : [];
  }
}
