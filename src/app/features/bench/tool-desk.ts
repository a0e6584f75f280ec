import { computed, inject, Injectable, signal } from '@angular/core';
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
  readonly activity = this.inHand.asReadonly();
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

  take(activity: Activity): void {
    this.inHand.set(activity);
    this.running.set(start(activity));
    if (activity.does !== 'measure') return;
    this.bench.structure.set(activity.structure);
    this.bench.openSeries(activity.structure);
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
    // an edit that has nowhere to go (its series is not open yet) is not lost: the tool waits where it was
    if (edit && !this.keep(edit)) return;
    this.running.set({ ...running, state });
  }

  /** @returns whether the edit could be kept */
  private keep({ does, noteId, geometry }: ToolEdit): boolean {
    const activity = this.inHand();
    if (!activity) return false;
    if (activity.does === 'reference') {
      if (geometry.type === 'line') this.reference.set({ a: geometry.a, b: geometry.b });
      return true;
    }
    if (does === 'reshape') {
      this.notes.reshape(noteId, geometry);
      return true;
    }
    if (activity.does === 'measure') {
      const series = this.bench.ownSeries(activity.structure);
      if (!series) this.bench.openSeries(activity.structure);
      else this.notes.add({ kind: 'measure', seriesId: series.id, geometry, text: '' }, noteId);
      return series !== null;
    }
    this.notes.add({ kind: activity.does, seriesId: null, geometry, text: '' }, noteId);
    this.wantsWords.set(noteId);
    return true;
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
