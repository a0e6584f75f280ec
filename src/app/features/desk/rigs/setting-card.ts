import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { CalibrationView, SettingView } from '@shared/contracts/rigs';
import { formatLength } from '@shared/units/length';
import { dayWords } from '../../../core/day-words';
import { percentWords, scaleWords } from './calibration-words';
import { HistoryPlot } from './history-plot';

/** One setting: what it is, the scale that holds now, and those before it. */
@Component({
  selector: 'app-setting-card',
  imports: [RouterLink, MatButtonModule, HistoryPlot],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './setting-card.html',
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 6px;
      padding: 16px 18px;
      background: var(--label);
      border: 1px solid var(--line);
    }
    p {
      margin: 0;
    }
    .scale {
      font: 400 1.1875rem/1.4 var(--serif);
    }
    .none {
      color: var(--warn);
    }
    .acts {
      margin-top: auto;
      padding-top: 8px;
    }
    ol {
      margin: 8px 0 0;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      justify-content: space-between;
      gap: 0 12px;
    }
    summary {
      padding: 8px 0;
      cursor: pointer;
    }
  `,
})
export class SettingCard {
  readonly setting = input.required<SettingView>();
  /** a picture to calibrate with */
  readonly image = input<string>();

  protected readonly dayWords = dayWords;
  protected readonly scaleWords = scaleWords;
  protected readonly percentWords = percentWords;
  protected readonly optics = computed(() => {
    const { objective, magnification, numericalAperture, captureMode } = this.setting();
    const parts = [
      objective,
      magnification === null ? '' : `${magnification}×`,
      numericalAperture === null ? '' : $localize`NA ${numericalAperture}:aperture:`,
      captureMode,
    ];
    return parts.filter(Boolean).join(' · ');
  });

  protected spanWords({ spanUm }: CalibrationView): string {
    return formatLength(spanUm, spanUm < 1000 ? 0 : 2);
  }
}
