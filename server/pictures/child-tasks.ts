import type { Refusal } from '../../shared/contracts/images.js';
import type { CaptureNotes } from './capture-notes.js';
import type { PictureType } from './file-type.js';

/** What the web process asks of the process that decodes. */
export type ChildTask =
  | {
      readonly task: 'intake';
      readonly source: string;
      /** an empty folder; the access copy and the renditions are made in it */
      readonly folder: string;
      readonly maxPixels: number;
    }
  | {
      readonly task: 'portrait';
      readonly source: string;
      readonly target: string;
      readonly sidePx: number;
      readonly maxPixels: number;
    };

export interface IntakeFacts {
  readonly format: PictureType;
  /** upright px */
  readonly width: number;
  readonly height: number;
  readonly bitDepth: number;
  readonly renditionWidths: readonly number[];
  readonly colours: readonly string[];
  /** null: the file carries none */
  readonly notes: CaptureNotes | null;
}

export type ChildAnswer =
  | { readonly done: 'intake'; readonly facts: IntakeFacts }
  | { readonly done: 'portrait' }
  | { readonly done: 'refused'; readonly refusal: Refusal };
