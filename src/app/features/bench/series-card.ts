import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { seriesRoutes, type SeriesView } from '@shared/contracts/series';
import { structureOf } from '@shared/annotations/structures';
import { quantityText } from '@shared/scale/rounding';
import { decimalsFor } from '@shared/units/decimals';
import { MICROMETRES_PER, unitFor } from '@shared/units/length';
import { pathOf } from '../../core/api';
import { SessionStore } from '../../core/session-store';
import { structureWords } from '../../core/structure-words';
import { StripPlot, type PublishedRange } from '../../ui/strip-plot/strip-plot';
import { BenchStore } from './bench-store';
import { EdgeQuestion } from './edge-question';
import { dimensionWords } from './measure-words';
import type { DimensionFigures, SeriesFigures } from './series-figures';

/** One series while it grows: number, mean, spread, notation, and how it lies against published sizes. */
@Component({
  selector: 'app-series-card',
  imports: [StripPlot, EdgeQuestion],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './series-card.html',
  styleUrl: './series-card.scss',
})
export class SeriesCard {
  private readonly bench = inject(BenchStore);
  private readonly me = inject(SessionStore).user;

  readonly series = input.required<SeriesView>();

  protected readonly name = computed(() => structureWords(this.series().structure));
  protected readonly observer = computed(() =>
    this.series().observer.id === this.me()?.id ? null : this.series().observer.name,
  );
  protected readonly figures = computed(() => this.bench.figuresOf(this.series()));
  protected readonly wanted = computed(() => structureOf(this.series().structure)?.wanted ?? 0);
  protected readonly csv = computed(() => pathOf(seriesRoutes.csv, { params: { seriesId: this.series().id } }));
  protected readonly lines = computed(() => {
    const figures = this.figures();
    return figures ? figures.dimensions.map((one) => this.line(figures, one)) : [];
  });
  /** those that published sizes can be laid beside; the first dimension where there are none */
  protected readonly plots = computed(() => {
    const plotted = this.lines().filter((line) => line.plotted !== null);
    const held = plotted.filter((line) => line.published.length > 0);
    return held.length > 0 ? held : plotted.slice(0, 1);
  });
  protected readonly k = computed(() => {
    const k = this.figures()?.dimensions[0]?.summary.k;
    return k === undefined ? null : Number(k.toFixed(2));
  });
  protected readonly q = computed(() => {
    const q = this.figures()?.q;
    if (!q) return null;
    // a ratio is printed to hundredths at most: the thousandths of a sure mean say nothing of the bodies
    const decimals = q.u > 0 ? Math.min(2, decimalsFor(q.U, 2)) : 2;
    return { value: q.mean.toFixed(decimals), uncertainty: q.u > 0 ? Math.max(q.U, 0.01).toFixed(decimals) : null };
  });

  private line({ unit, grounds, dimensions }: SeriesFigures, { dimension, summary, values }: DimensionFigures) {
    const { mean, u, U, k, sd, n } = summary;
    const scaled = unit === 'µm' && grounds !== 'none' ? grounds : null;
    const shown = scaled ? unitFor(mean) : null;
    const per = shown ? MICROMETRES_PER[shown] : 1;
    return {
      dimension,
      unit: shown ?? 'px',
      title: dimensions.length > 1 ? dimensionWords(dimension) : null,
      label: `${this.name()}, ${dimensionWords(dimension)}`,
      // quantityText expands by 2: it is handed the u that comes out as k·u
      mean: scaled ? quantityText(mean, (u * k) / 2, scaled) : `${mean.toFixed(1)} px`,
      sd: sd === null ? null : `${scaled ? spread(sd / per) : sd.toFixed(1)} ${shown ?? 'px'}`,
      n,
      values: values.map((value) => value / per),
      plotted: scaled ? { value: mean / per, expanded: U / per } : null,
      published: scaled ? this.published(dimension, per) : [],
    };
  }

  /** @param per µm in the unit that is shown */
  private published(dimension: string, per: number): PublishedRange[] {
    const { structure } = this.series();
    return (this.bench.find()?.publishedSizes ?? [])
      .filter((size) => size.structure === structure && size.dimension === dimension)
      .map((size) => ({
        name: size.taxonName,
        low: size.minUm / per,
        high: size.maxUm / per,
        source: [size.source, size.year].filter(Boolean).join(', '),
      }));
  }
}

/** A standard deviation to two digits. */
function spread(sd: number): string {
  return sd > 0 ? sd.toFixed(Math.max(0, decimalsFor(sd, 2))) : '0';
}
