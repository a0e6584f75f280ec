import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { finalize, of } from 'rxjs';
import type { CalibrationKept as Kept } from '@shared/contracts/rigs';
import { toApiProblem, type ApiProblem } from '../../../core/api-problem';
import { ProblemBox } from '../../../ui/problem/problem';
import { SettingGiver } from '../tray/setting-giver';
import { TrayStore } from '../tray/tray-store';
import { scaleWords } from './calibration-words';

/** The last step: what keeping a calibration did, and where to go on. */
@Component({
  selector: 'app-calibration-kept',
  imports: [RouterLink, MatButtonModule, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="scale numbers" role="status">
      <ng-container i18n>Kept: </ng-container>{{ scaleWords(kept().calibration) }}
    </p>
    <p role="status" i18n>
      {carried(), plural,
        =0 {No picture waited for it.}
        =1 {1 picture of this setting carries it now.}
        other {{{ carried() }} pictures of this setting carry it now.}
      }
    </p>
    @if (kept().calibration.validUntil; as until) {
      <p class="soft" i18n>It holds for this sitting, until {{ clock(until) }}.</p>
    }
    @if (candidates().length > 0) {
      <p class="offer">
        <span i18n>
          {candidates().length, plural,
            =1 {1 picture in your tray has this size and no scale. Was it taken with this setting?}
            other {
              {{ candidates().length }} pictures in your tray have this size and no scale. Were they taken with this
              setting?
            }
          }
        </span>
        <button type="button" mat-stroked-button [disabled]="busy()" disabledInteractive (click)="give()" i18n>
          Yes, give this scale
        </button>
      </p>
    }
    @if (problem(); as problem) {
      <app-problem [problem]="problem" />
    }
    <p class="acts">
      <a mat-flat-button routerLink="/desk/tray" i18n>To the sorting tray</a>
      <a mat-stroked-button [routerLink]="['/images', kept().calibration.imageId]" i18n>Measure in its picture</a>
      <a mat-stroked-button routerLink="/desk/rigs" i18n>Back to the rigs</a>
    </p>
  `,
  styles: `
    .scale {
      font: 400 1.5rem/1.3 var(--serif);
    }
    .offer {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 8px 16px;
      max-width: var(--measure);
      padding: 10px 14px;
      border-left: 3px solid var(--lichen);
      background: var(--lichen-wash);
    }
    .acts {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      margin-top: 20px;
    }
  `,
})
export class CalibrationKept {
  private readonly tray = inject(TrayStore);
  private readonly giver = inject(SettingGiver);

  readonly kept = input.required<Kept>();

  protected readonly scaleWords = scaleWords;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  /** given it here, besides those that waited */
  private readonly given = signal(0);
  protected readonly carried = computed(() => this.kept().scaledImages + this.given());

  /** The size alone proves nothing, so they are asked about. */
  protected readonly candidates = computed(() => {
    const { frameWidth, frameHeight } = this.kept().calibration;
    return this.tray
      .ready()
      .filter(({ image }) => image?.width === frameWidth && image.height === frameHeight && image.scale === null);
  });

  constructor() {
    this.tray.live.pipe(takeUntilDestroyed()).subscribe();
  }

  protected give(): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.giver
      .give(this.candidates(), this.kept().calibration.settingId, () => of(undefined))
      .pipe(finalize(() => this.busy.set(false)))
      .subscribe({
        next: ({ scaled }) => {
          this.given.update((before) => before + scaled);
          this.tray.refresh();
        },
        error: (error: unknown) => this.problem.set(toApiProblem(error)),
      });
  }

  protected clock(instant: string): string {
    return new Date(instant).toLocaleTimeString([], { hour: '2-digit', minute: '2-digit' });
  }
}
