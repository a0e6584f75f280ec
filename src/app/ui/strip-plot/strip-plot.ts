import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { axisFor, stacked } from './axis';

export interface PublishedRange {
  /** the taxon, as it stands beside its bar */
  readonly name: string;
  readonly low: number;
  readonly high: number;
  readonly source: string;
}

/** Heights in CSS px; widths are shares of the place, so that text keeps its size. */
const RANGE = 34;
const DOT = 5;
const LEAST_STRIP = 34;

/**
 * Measured values as dots on one axis, their mean with its uncertainty, and above them what books say.
 * All in one unit. The picture is also said in words.
 */
@Component({
  selector: 'app-strip-plot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './strip-plot.html',
  styleUrl: './strip-plot.scss',
})
export class StripPlot {
  /** what is plotted, as its reader calls it: "Spore length" */
  readonly label = input.required<string>();
  readonly unit = input.required<string>();
  readonly values = input.required<readonly number[]>();
  readonly published = input<readonly PublishedRange[]>([]);
  /** of the values, with its expanded uncertainty; null for none */
  readonly mean = input<{ readonly value: number; readonly expanded: number } | null>(null);

  private readonly axis = computed(() => {
    const mean = this.mean();
    return axisFor([
      ...this.values(),
      ...this.published().flatMap(({ low, high }) => [low, high]),
      ...(mean ? [mean.value - mean.expanded, mean.value + mean.expanded] : []),
    ]);
  });
  protected readonly ticks = computed(() => {
    const { ticks, decimals } = this.axis();
    const every = ticks.length > 7 ? 2 : 1;
    return ticks.map((tick, i) => ({ at: this.at(tick), text: i % every === 0 ? tick.toFixed(decimals) : '' }));
  });
  protected readonly ranges = computed(() =>
    this.published().map((range, row) => {
      const [from, to] = [this.share(range.low), this.share(range.high)];
      // the name stands where it has room: from the bar's left end, or up to its right one
      const atEnd = from > 55;
      return {
        ...range,
        y: row * RANGE,
        from: `${from}%`,
        width: `${Math.max(0.6, to - from)}%`,
        name: range.name,
        textAt: `${atEnd ? to : from}%`,
        anchor: atEnd ? 'end' : 'start',
      };
    }),
  );
  protected readonly dots = computed(() => {
    const { low, high } = this.axis();
    // a strip is some 260 px wide: dots of 5 px touch there
    const rows = stacked(this.values(), ((high - low) * (DOT + 1)) / 260);
    const most = Math.max(0, ...rows.map(({ row }) => row));
    const step = Math.min(DOT + 2, 60 / (most + 1));
    return rows.map(({ value, row }) => ({ at: this.at(value), y: (row - most / 2) * step }));
  });
  protected readonly top = computed(() => this.published().length * RANGE);
  protected readonly strip = computed(() => Math.max(LEAST_STRIP, ...this.dots().map(({ y }) => 2 * Math.abs(y) + 14)));
  protected readonly middle = computed(() => this.top() + this.strip() / 2);
  protected readonly base = computed(() => this.top() + this.strip() + 6);
  protected readonly meanBar = computed(() => {
    const mean = this.mean();
    if (!mean) return null;
    const { value, expanded } = mean;
    return { at: this.at(value), from: this.at(value - expanded), to: this.at(value + expanded) };
  });
  protected readonly words = computed(() => {
    const [values, unit, name] = [this.values(), this.unit(), this.label()];
    const { decimals } = this.axis();
    const digits = decimals + 1;
    const own =
      values.length === 0
        ? $localize`${name}:what:: nothing measured yet`
        : $localize`${name}:what:: ${values.length}:count: values from ${Math.min(...values).toFixed(digits)}:least: to ${Math.max(...values).toFixed(digits)}:most: ${unit}`;
    const books = this.published().map(
      ({ name: taxon, low, high }) => $localize`${taxon}, published: ${low} to ${high} ${unit}`,
    );
    return [own, ...books].join('; ');
  });

  private share(value: number): number {
    const { low, high } = this.axis();
    return (100 * (value - low)) / (high - low);
  }
  private at(value: number): string {
    return `${this.share(value)}%`;
  }
}
