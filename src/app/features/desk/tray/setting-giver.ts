import { inject, Injectable } from '@angular/core';
import { catchError, concatMap, forkJoin, from, map, mergeMap, of, throwError, toArray, type Observable } from 'rxjs';
import { imageRoutes, type TrayPicture } from '@shared/contracts/images';
import { Api } from '../../../core/api';
import { ApiProblem } from '../../../core/api-problem';
import type { SizeAnswer } from './size-question';

export interface GivenSetting {
  /** carry the scale now */
  readonly scaled: number;
  /** wait until the setting is calibrated */
  readonly waiting: number;
  /** without a scale because nobody could say how they came by their size */
  readonly left: number;
}

type Outcome = 'scaled' | 'waiting' | 'other-size';

/** So many requests at once. */
const AT_ONCE = 4;

/** Says for many pictures at once which setting they were taken with, and gives them its scale. */
@Injectable({ providedIn: 'root' })
export class SettingGiver {
  private readonly api = inject(Api);

  /**
   * Where the setting has no calibration that holds, a picture waits for one. Where the size is not the calibrated
   * frame's, `ask` is asked once for all of them; without an answer they stay as they are.
   */
  give(
    pictures: readonly TrayPicture[],
    settingId: string,
    ask: (count: number) => Observable<SizeAnswer | undefined>,
  ): Observable<GivenSetting> {
    return this.tryAll(pictures, settingId).pipe(
      concatMap((first) => {
        const odd = pictures.filter((_, at) => first[at] === 'other-size');
        if (odd.length === 0) return of(first);
        const settled = first.filter((outcome) => outcome !== 'other-size');
        return ask(odd.length).pipe(
          concatMap((answer) =>
            answer ? this.tryAll(odd, settingId, answer) : of(odd.map((): Outcome => 'other-size')),
          ),
          map((second) => [...settled, ...second]),
        );
      }),
      map((outcomes) => ({
        scaled: outcomes.filter((outcome) => outcome === 'scaled').length,
        waiting: outcomes.filter((outcome) => outcome === 'waiting').length,
        left: outcomes.filter((outcome) => outcome === 'other-size').length,
      })),
    );
  }

  private tryAll(pictures: readonly TrayPicture[], settingId: string, answer?: SizeAnswer): Observable<Outcome[]> {
    return from(pictures).pipe(
      mergeMap((picture, at) => forkJoin([of(at), this.one(picture.id, settingId, answer)]), AT_ONCE),
      toArray(),
      map((all) => all.toSorted(([a], [b]) => a - b).map(([, outcome]) => outcome)),
    );
  }

  private one(imageId: string, settingId: string, sizeAnswer?: SizeAnswer): Observable<Outcome> {
    const params = { imageId };
    const body = { by: 'setting' as const, settingId, ...(sizeAnswer ? { sizeAnswer } : {}) };
    return this.api.call(imageRoutes.setScale, { params, body }).pipe(
      map((): Outcome => 'scaled'),
      catchError((error: unknown) => {
        if (error instanceof ApiProblem && error.code === 'reduced-or-cropped') return of<Outcome>('other-size');
        if (error instanceof ApiProblem && error.code === 'no-calibration') {
          return this.api.call(imageRoutes.edit, { params, body: { settingId } }).pipe(map((): Outcome => 'waiting'));
        }
        return throwError(() => error);
      }),
    );
  }
}
