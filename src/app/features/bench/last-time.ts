import { DOCUMENT, inject, Injectable } from '@angular/core';
import type { SeriesView } from '@shared/contracts/series';

export type SeriesChoices = Pick<SeriesView, 'edgeRule' | 'ornamentIncluded'>;

/** Nothing is claimed that nobody said: the outer edge is what most people draw, the ornament is not known. */
const FIRST_TIME: SeriesChoices = { edgeRule: 'outer', ornamentIncluded: null };

/** How this person took the edges of a structure last time, so that a new series begins with one touch. */
@Injectable({ providedIn: 'root' })
export class LastTime {
  private readonly document = inject(DOCUMENT);

  of(structure: string): SeriesChoices {
    try {
      const kept = JSON.parse(
        this.document.defaultView?.localStorage.getItem(keyOf(structure)) ?? 'null',
      ) as Partial<SeriesChoices> | null;
      return { ...FIRST_TIME, ...kept };
    } catch {
      return FIRST_TIME; // storage closed, or not ours
    }
  }

  remember(structure: string, choices: SeriesChoices): void {
    try {
      this.document.defaultView?.localStorage.setItem(keyOf(structure), JSON.stringify(choices));
    } catch {
      // It is asked again next time.
    }
  }
}

const keyOf = (structure: string) => `last-series/${structure}`;
