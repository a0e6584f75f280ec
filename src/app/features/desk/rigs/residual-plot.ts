import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CalibrationFit } from '@shared/scale/calibration';

const WIDTH = 300;
const HEIGHT = 64;
const EDGE = 6;

/** Half of the axis at least, image px: so that marks within half a pixel look as good as they are. */
const LEAST_PX = 1;

/** How far each mark lies from its fitted place along the ruling, as stems from a rule. For three marks or more. */
@Component({
  selector: 'app-residual-plot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 300 64" role="img" [attr.aria-label]="words()">
      <line class="axis" x1="0" x2="300" y1="32" y2="32" />
      @for (stem of stems(); track $index) {
        <line [class.worst]="stem.worst" [attr.x1]="stem.x" [attr.x2]="stem.x" y1="32" [attr.y2]="stem.y" />
        <circle [class.worst]="stem.worst" [attr.cx]="stem.x" [attr.cy]="stem.y" r="2.5" />
      }
    </svg>
    <p class="soft numbers">{{ words() }}</p>
  `,
  styles: `
    line {
      stroke: var(--rust);
    }
    .axis {
      stroke: var(--line-strong);
    }
    circle {
      fill: var(--rust);
    }
    circle.worst {
      fill: var(--warn);
    }
    line.worst {
      stroke: var(--warn);
    }
    p {
      margin: 4px 0 0;
      font-size: 0.9375rem;
    }
  `,
})
export class ResidualPlot {
  readonly fit = input.required<CalibrationFit>();
  /** the number of each mark, in the order of the fit's residuals */
  readonly indices = input.required<readonly number[]>();

  private readonly worst = computed(() => Math.max(...this.fit().residualsPx.map(Math.abs)));

  protected readonly words = computed(() => {
    const { residualsPx, residualSdPx } = this.fit();
    const worst = this.worst();
    const which = this.indices()[residualsPx.findIndex((residual) => Math.abs(residual) === worst)] ?? 0;
    return $localize`Scatter of the marks ${(residualSdPx ?? 0).toFixed(2)}:sd: px; mark ${which}:number: lies farthest off, ${worst.toFixed(2)}:worst: px`;
  });

  protected readonly stems = computed(() => {
    const indices = this.indices();
    const first = Math.min(...indices);
    const range = Math.max(...indices) - first || 1;
    const half = Math.max(LEAST_PX, this.worst());
    return this.fit().residualsPx.map((residual, i) => ({
      x: EDGE + (((indices[i] ?? first) - first) / range) * (WIDTH - 2 * EDGE),
      y: HEIGHT / 2 - (residual / half) * (HEIGHT / 2 - EDGE),
      worst: indices.length > 2 && Math.abs(residual) === this.worst() && this.worst() > LEAST_PX,
    }));
  });
}
