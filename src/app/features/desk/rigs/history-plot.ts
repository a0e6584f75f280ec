import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CalibrationView } from '@shared/contracts/rigs';

const WIDTH = 320;
const HEIGHT = 72;
const EDGE = 8;

/** A setting's calibrations over time as points with their U (k = 2), so that a drift or a slip is seen. */
@Component({
  selector: 'app-history-plot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg [attr.viewBox]="box" role="img" [attr.aria-label]="words()">
      <line class="axis" [attr.x1]="0" [attr.x2]="width" [attr.y1]="height - 1" [attr.y2]="height - 1" />
      @for (point of points(); track point.id) {
        <line class="whisker" [attr.x1]="point.x" [attr.x2]="point.x" [attr.y1]="point.low" [attr.y2]="point.high" />
        <circle [attr.cx]="point.x" [attr.cy]="point.y" r="3.5" [class.lapsed]="point.lapsed" />
      }
    </svg>
  `,
  styles: `
    :host {
      display: block;
      max-width: 320px;
    }
    .axis {
      stroke: var(--line-strong);
    }
    .whisker {
      stroke: var(--rust);
      stroke-width: 1.5;
    }
    circle {
      fill: var(--rust);
    }
    .lapsed {
      fill: var(--paper);
      stroke: var(--rust);
      stroke-width: 1.5;
    }
  `,
})
export class HistoryPlot {
  /** newest first */
  readonly history = input.required<readonly CalibrationView[]>();

  protected readonly width = WIDTH;
  protected readonly height = HEIGHT;
  protected readonly box = `0 0 ${WIDTH} ${HEIGHT}`;
  protected readonly words = computed(
    () => $localize`${this.history().length}:count: calibrations over time, with their uncertainty`,
  );

  protected readonly points = computed(() => {
    const all = this.history().map((calibration) => ({
      id: calibration.id,
      at: Date.parse(calibration.createdAt),
      value: calibration.umPerPxX,
      U: 2 * calibration.umPerPxX * calibration.relativeUncertainty,
      lapsed: calibration.validUntil !== null,
    }));
    const x = along(
      all.map(({ at }) => at),
      EDGE,
      WIDTH - EDGE,
    );
    const y = along(
      all.flatMap(({ value, U }) => [value - U, value + U]),
      HEIGHT - EDGE,
      EDGE,
    );
    return all.map(({ id, at, value, U, lapsed }) => ({
      id,
      lapsed,
      x: x(at),
      y: y(value),
      low: y(value - U),
      high: y(value + U),
    }));
  });
}

/** A linear scale over the values' range; a single value stands in the middle. */
function along(values: readonly number[], from: number, to: number): (value: number) => number {
  const low = Math.min(...values);
  const high = Math.max(...values);
  return (value) => (high > low ? from + ((value - low) / (high - low)) * (to - from) : (from + to) / 2);
}
