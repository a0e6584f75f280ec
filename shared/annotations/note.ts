import type { ImagePoint } from '../geometry/points.js';

/**
 * Anything said on a picture. All geometry is in pixels of the upright original.
 *
 * - `measure`: one body of a structure; belongs to a series
 * - `point`: a pointer with words
 * - `round`: a drawn round with words
 */
export type NoteGeometry =
  | { readonly type: 'line'; readonly a: ImagePoint; readonly b: ImagePoint }
  | {
      readonly type: 'cross';
      /** along the body */
      readonly along: { readonly a: ImagePoint; readonly b: ImagePoint };
      /** across it; null while only the first line is drawn */
      readonly across: { readonly a: ImagePoint; readonly b: ImagePoint } | null;
    }
  /** 2 or more vertices, open */
  | { readonly type: 'path'; readonly points: readonly ImagePoint[] }
  /** `at` is what is meant; `label` where the words stand */
  | { readonly type: 'pointer'; readonly at: ImagePoint; readonly label: ImagePoint }
  /** 3 or more vertices, unclosed */
  | { readonly type: 'outline'; readonly points: readonly ImagePoint[] };

export const NOTE_KINDS = ['measure', 'point', 'round'] as const;
export type NoteKind = (typeof NOTE_KINDS)[number];

/** The state of one note. A deleted note is `null` in edits, never a flag. */
export interface Note {
  readonly id: string;
  readonly imageId: string;
  /** whose layer it lies in: the author's user id */
  readonly layer: string;
  readonly kind: NoteKind;
  /** for `measure`; null otherwise */
  readonly seriesId: string | null;
  readonly geometry: NoteGeometry;
  readonly text: string;
}

/**
 * One reversible change of one note. `before` null: made; `after` null: removed.
 * One gesture makes one edit, hence one undo.
 */
export interface NoteEdit {
  /** UUIDv7 made by the client: sending it twice changes nothing */
  readonly id: string;
  readonly noteId: string;
  readonly before: Note | null;
  readonly after: Note | null;
}
