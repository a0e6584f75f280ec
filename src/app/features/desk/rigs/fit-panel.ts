import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CalibrationView } from '@shared/contracts/rigs';
import { formatLength } from '@shared/units/length';
import { ApiProblem } from '../../../core/api-problem';
import { dayWords } from '../../../core/day-words';
import { problemWords } from '../../../core/problem-words';
import { departure, ENOUGH_MARKS, LONG_ENOUGH, type Look } from './calibration-look';
import { percentWords, scaleWords } from './calibration-words';
import { ResidualPlot } from './residual-plot';

/** The live fit: the scale, what makes it doubtful, and what would make it surer. */
@Component({
  selector: 'app-fit-panel',
  imports: [ResidualPlot],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './fit-panel.html',
  styles: `
    p {
      margin: 0 0 8px;
    }
    .scale {
      font: 400 1.375rem/1.3 var(--serif);
    }
    .shares {
      display: flex;
      height: 10px;
      margin-top: 12px;
      border: 1px solid var(--line-strong);
    }
    .marks {
      background: var(--rust);
    }
    .micrometer {
      flex: 1;
      background: var(--lichen);
    }
    .parts {
      display: flex;
      flex-wrap: wrap;
      gap: 0 16px;
      margin: 4px 0 14px;
      font-size: 0.9375rem;
    }
    .key {
      display: inline-block;
      width: 10px;
      height: 10px;
      margin-right: 6px;
    }
    .advice {
      margin-top: 10px;
      padding: 6px 12px;
      border-left: 3px solid var(--lichen);
      background: var(--lichen-wash);
    }
    .wrong {
      padding: 6px 12px;
      border-left: 3px solid var(--warn);
    }
  `,
})
export class FitPanel {
  readonly look = input.required<Look>();
  /** the number of each mark along */
  readonly indices = input.required<readonly number[]>();
  /** the setting's last calibration, to hold the new one against */
  readonly last = input<CalibrationView | null>(null);
  /** the picture's width, to be held against the last frame's */
  readonly width = input.required<number>();

  protected readonly scaleWords = scaleWords;
  protected readonly percentWords = percentWords;
  protected readonly fitted = computed(() => {
    const look = this.look();
    return look.state === 'fit' ? look : null;
  });
  protected readonly problem = computed(() => {
    const look = this.look();
    return look.state === 'problem' ? problemWords(new ApiProblem(look.code, 422, look.parameters)) : '';
  });
  protected readonly span = computed(() => {
    const um = this.fitted()?.fit.spanUm ?? 0;
    return formatLength(um, um < 1000 ? 0 : 2);
  });
  /** per cent of the variance; the rest is the micrometer's */
  protected readonly marksShare = computed(() => {
    const { fromMarks, fromMicrometer } = this.fitted() ?? { fromMarks: 0, fromMicrometer: 0 };
    const whole = fromMarks ** 2 + fromMicrometer ** 2;
    return whole === 0 ? 0 : Math.round((100 * fromMarks ** 2) / whole);
  });
  protected readonly sharesLabel = computed(
    () => $localize`${this.marksShare()}:share: % of the doubt comes from the marks, the rest from the micrometer`,
  );

  protected readonly advice = computed(() => {
    const seen = this.fitted();
    if (!seen) return [];
    return [this.departing(), this.otherFrame(), spanAdvice(seen.spanShare), countAdvice(seen.fit.count)].filter(
      (sentence) => sentence !== null,
    );
  });

  private departing(): string | null {
    const seen = this.fitted();
    const last = this.last();
    const by = seen && last ? departure(seen.scale, last) : null;
    if (by === null || !last) return null;
    const percent = `${by > 0 ? '+' : '−'}${Number(Math.abs(100 * by).toPrecision(2))} %`;
    return $localize`This departs by ${percent}:percent: from ${dayWords(last.createdAt)}:day:, more than both allow. Was the adapter, the zoom or the spacing another?`;
  }

  private otherFrame(): string | null {
    const last = this.last();
    if (!last || last.frameWidth === this.width()) return null;
    return $localize`The last calibration's picture was ${last.frameWidth}:before: px wide, this one is ${this.width()}:now: px. Another capture mode is a setting of its own.`;
  }
}

function spanAdvice(share: number): string | null {
  if (share >= LONG_ENOUGH) return null;
  return $localize`The marks span ${Math.round(100 * share)}:percent: % of the picture. Use the longest span in view: both doubts shrink with it.`;
}

function countAdvice(count: number): string | null {
  if (count >= ENOUGH_MARKS) return null;
  return $localize`With ${ENOUGH_MARKS}:count: marks or more their own scatter tells how well you point; until then a cautious value is taken.`;
}
