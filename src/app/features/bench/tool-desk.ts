import { computed, inject, Injectable, signal } from '@angular/core';
import { finalize } from 'rxjs';
import { v7 as newId } from 'uuid';
import { structureOf } from '@shared/annotations/structures';
import { px, type ImagePoint } from '@shared/geometry/points';
import type { Segment } from '@shared/geometry/segment';
import { BenchStore } from './bench-store';
import { NoteStore } from './note-store';
import { alongThenAcrossTool } from './tools/along-then-across';
import { lineTool } from './tools/line-tool';
import { outlineTool } from './tools/outline-tool';
import { pathTool } from './tools/path-tool';
import { pointerTool } from './tools/pointer-tool';
import { NOTHING_DRAWN, type Awaits, type Tool, type ToolEdit, type ToolInput } from './tools/tool';

/** What the hand is for just now. */
export type Activity =
  | { readonly does: 'measure'; readonly structure: string }
  | { readonly does: 'point' }
  | { readonly does: 'round' }
  /** a line over something of known size; it becomes a scale, not a note */
  | { readonly does: 'reference' };

/** A tool and its state, whatever type that has: the one place where the two are kept together. */
interface Running {
  readonly tool: Tool<unknown>;
  readonly state: unknown;
}

/** The tool in hand, its state, and where its edits go. */
@Injectable()
export class ToolDesk {
  private readonly notes = inject(NoteStore);
  private readonly bench = inject(BenchStore);

  private readonly inHand = signal<Activity | null>(null);
  private readonly running = signal<Running | null>(null);
  private readonly isOpening = signal(false);
  private waiting: { readonly structure: string; readonly edit: ToolEdit }[] = [];
  readonly activity = this.inHand.asReadonly();
  /** a series is being opened for the first body of a structure */
  readonly opening = this.isOpening.asReadonly();
  /** the line that says how large something is, while a scale is being set by it */
  readonly reference = signal<Segment | null>(null);
  /** where the keyboard draws; null while the mouse or a finger does */
  readonly crosshair = signal<ImagePoint | null>(null);
  /** a pointer or round that was just made and wants words */
  readonly wantsWords = signal<string | null>(null);

  readonly preview = computed(() => {
    const running = this.running();
    return running ? running.tool.preview(running.state) : NOTHING_DRAWN;
  });
  readonly awaits = computed<Awaits | null>(() => {
    const running = this.running();
    return running ? running.tool.awaits(running.state) : null;
  });
  /** something is begun that Escape would drop */
  readonly busy = computed(() => this.preview().lines.length > 0 || this.awaits() === 'across');

  /** Another tool lets go of the selected note, whose ends would otherwise catch the first stroke beside them. */
  take(activity: Activity): void {
    if (JSON.stringify(activity) !== JSON.stringify(this.inHand())) this.notes.select(null);
    this.inHand.set(activity);
    this.running.set(start(activity));
    if (activity.does === 'measure') this.bench.structure.set(activity.structure);
  }

  putAway(): void {
    this.inHand.set(null);
    this.running.set(null);
    this.crosshair.set(null);
    this.reference.set(null);
  }

  /** Forgets what is begun, as undo and another picture do. */
  restart(): void {
    const activity = this.inHand();
    if (activity) this.running.set(start(activity));
  }

  point(type: 'down' | 'move' | 'up', at: ImagePoint, slop: number): void {
    this.send({ type, at: this.held(at), slop, newId: newId() });
  }

  finish(): void {
    this.send({ type: 'finish', newId: newId() });
  }

  tell(type: 'abort' | 'back'): void {
    this.send({ type });
  }

  /** One step back: first what is begun, then the tool. @returns false when there was nothing */
  cancel(): boolean {
    if (this.busy()) this.send({ type: 'cancel' });
    else if (this.inHand()) this.putAway();
    else return false;
    return true;
  }

  private send(input: ToolInput): void {
    const running = this.running();
    if (!running) return;
    const { state, edit } = running.tool.step(running.state, input);
    this.running.set({ ...running, state });
    if (edit) this.keep(edit);
  }

  private keep(edit: ToolEdit): void {
    const activity = this.inHand();
    if (!activity) return;
    const { does, noteId, geometry } = edit;
    if (activity.does === 'measure') this.measure(activity.structure, edit);
    else if (activity.does === 'reference') {
      if (geometry.type === 'line') this.reference.set({ a: geometry.a, b: geometry.b });
    } else if (does === 'add') {
      this.notes.add({ kind: activity.does, seriesId: null, geometry, text: '' }, noteId);
      this.wantsWords.set(noteId);
    }
  }

  /**
   * A series is opened by its first body and not by taking the tool up, so that looking around leaves none
   * behind. Bodies drawn until it is open wait for it, in their order.
   */
  private measure(structure: string, edit: ToolEdit): void {
    const series = this.bench.ownSeries(structure);
    if (series && this.waiting.length === 0) this.draw(series.id, edit);
    else this.waiting.push({ structure, edit });
    if (this.waiting.length === 0 || this.isOpening()) return;
    this.isOpening.set(true);
    this.bench
      .openSeries(structure)
      .pipe(finalize(() => this.isOpening.set(false)))
      .subscribe(({ id }) => {
        for (const one of this.waiting.filter((body) => body.structure === structure)) this.draw(id, one.edit);
        this.waiting = this.waiting.filter((body) => body.structure !== structure);
      });
  }

  private draw(seriesId: string, { does, noteId, geometry }: ToolEdit): void {
    if (does === 'add') this.notes.add({ kind: 'measure', seriesId, geometry, text: '' }, noteId);
    else this.notes.reshape(noteId, geometry);
  }

  /** What is drawn lies on the picture, or within a label's reach beside it. */
  private held({ x, y }: ImagePoint): ImagePoint {
    const image = this.bench.image();
    if (!image) return px(x, y);
    const hold = (value: number, size: number) => Math.min(size * 1.5, Math.max(-size * 0.5, value));
    return px(hold(x, image.width), hold(y, image.height));
  }
}

function start(activity: Activity): Running {
  // the state goes back into the tool that it came from and nowhere else
  const tool = toolFor(activity) as Tool<unknown>;
  return { tool, state: tool.start };
}

function toolFor(activity: Activity) {
  if (activity.does === 'point') return pointerTool;
  if (activity.does === 'round') return outlineTool;
  if (activity.does === 'reference') return lineTool;
  switch (structureOf(activity.structure)?.way) {
    case 'along-then-across':
      return alongThenAcrossTool;
    case 'along-bend':
      return pathTool;
    default:
      return lineTool;
  }
}
