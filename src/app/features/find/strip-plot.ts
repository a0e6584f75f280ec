import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { layOutStripPlot, type PublishedBand } from './strip-plot-layout';

/** Measured values against published ranges: rust dots, lichen bands, the mean with its uncertainty. */
@Component({
  selector: 'app-strip-plot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './strip-plot.html',
  styleUrl: './strip-plot.scss',
})
export class StripPlot {
  readonly values = input.required<readonly number[]>();
  readonly bands = input.required<readonly PublishedBand[]>();
  readonly mean = input.required<number>();
  /** U of the mean, k = 2 */
  readonly expanded = input.required<number>();
  /** the dots are then open: the whole cloud may lie elsewhere */
  readonly estimated = input(false);
  /** "Spore, along" */
  readonly what = input.required<string>();

  protected readonly layout = computed(() =>
    layOutStripPlot({ values: this.values(), bands: this.bands(), mean: this.mean(), expanded: this.expanded() }),
  );
  protected readonly words = computed(() => {
    const [least, most] = [Math.min(...this.values()), Math.max(...this.values())].map((um) => um.toPrecision(3));
    const measured = $localize`${this.what()}: ${this.values().length} values from ${least} to ${most} µm.`;
    const published = this.bands().map(
      ({ label, source, low, high }) => $localize`Published for ${label}: ${low} to ${high} µm, ${source}.`,
    );
    return [measured, ...published].join(' ');
  });
}
