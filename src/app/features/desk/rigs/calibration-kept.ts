import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { CalibrationKept as Kept } from '@shared/contracts/rigs';
import { scaleWords } from './calibration-words';

/** The last step: what keeping a calibration did, and where to go on. */
@Component({
  selector: 'app-calibration-kept',
  imports: [RouterLink, MatButtonModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="scale numbers" role="status">
      <ng-container i18n>Kept: </ng-container>{{ scaleWords(kept().calibration) }}
    </p>
    <p i18n>
      {kept().scaledImages, plural,
        =0 {No waiting picture is of this setting yet. Give a picture this setting, and it carries the scale.}
        =1 {1 waiting picture of this setting carries it now.}
        other {{{ kept().scaledImages }} waiting pictures of this setting carry it now.}
      }
    </p>
    @if (kept().calibration.validUntil; as until) {
      <p class="soft" i18n>It holds for this sitting, until {{ clock(until) }}.</p>
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
    .acts {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      margin-top: 20px;
    }
  `,
})
export class CalibrationKept {
  readonly kept = input.required<Kept>();

  protected readonly scaleWords = scaleWords;

  protected clock(instant: string): string {
    return new Date(instant).toLocaleTimeString([], { hour: '2-digit', minute: '2-digit' });
  }
}
