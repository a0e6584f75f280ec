import type { ImagePoint } from '@shared/geometry/points';
import type { NoteGeometry } from '@shared/annotations/note';

/** What a hand or the keyboard tells a tool. Tolerances are image px by now. */
export type ToolInput =
  | {
      /** `move` also comes without a press: then it is where the pointer hovers */
      readonly type: 'down' | 'move' | 'up';
      readonly at: ImagePoint;
      /** nearer than that is the same place, image px */
      readonly slop: number;
      /** UUIDv7, for a note that this input may make */
      readonly newId: string;
    }
  /** the press is taken back (a second finger came): all is as before it */
  | { readonly type: 'abort' }
  /** done, where nothing else says so: Enter, or a double click */
  | { readonly type: 'finish'; readonly newId: string }
  /** the last placed point goes */
  | { readonly type: 'back' }
  /** Escape: nothing that isn't an edit yet stays */
  | { readonly type: 'cancel' };

/** What a tool wants done: a new note, or another shape for one that it made. */
export interface ToolEdit {
  readonly does: 'add' | 'reshape';
  readonly noteId: string;
  readonly geometry: NoteGeometry;
}

export interface ToolStep<S> {
  readonly state: S;
  readonly edit?: ToolEdit;
}

/** What is being drawn and is no note yet. */
export interface Preview {
  /** lines of one or more points, image px */
  readonly lines: readonly (readonly ImagePoint[])[];
  /** a line that is only there to be drawn across: a square across is measured, a slanting one reads long */
  readonly across?: { readonly a: ImagePoint; readonly b: ImagePoint };
}

/**
 * A way of drawing, as a pure state machine: state + input → state + at most one edit. It knows no
 * browser, no scale and no document. One gesture makes one edit, hence one undo.
 */
export interface Tool<S> {
  readonly id: 'line' | 'along-then-across' | 'path' | 'outline' | 'pointer';
  readonly start: S;
  step(state: S, input: ToolInput): ToolStep<S>;
  preview(state: S): Preview;
  /** what it waits for, for the line that tells people what to do */
  awaits(state: S): Awaits;
}

export type Awaits = 'start' | 'end' | 'across' | 'across-end' | 'next-point';

export const NOTHING_DRAWN: Preview = { lines: [] };
