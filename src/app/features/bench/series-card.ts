import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { seriesRoutes, type SeriesView } from '@shared/contracts/series';
import { structureOf } from '@shared/annotations/structures';
import { quantityText } from '@shared/scale/rounding';
import type { Scale } from '@shared/scale/scale';
import { decimalsFor } from '@shared/scale/decimals';
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
    const inUm = unit === 'µm' && grounds !== 'none';
    return {
      dimension,
      title: dimensions.length > 1 ? dimensionWords(dimension) : null,
      label: `${this.name()}, ${dimensionWords(dimension)}`,
      // quantityText expands by 2: it is handed the u that comes out as k·u
      mean: inUm ? quantityText(mean, (u * k) / 2, grounds as Scale['grounds']) : `${mean.toFixed(1)} px`,
      sd:
        sd === null
          ? null
          : inUm
            ? `${sd.toFixed(Math.max(1, decimalsFor(Math.max(sd, 1e-9), 2)))} µm`
            : `${sd.toFixed(1)} px`,
      n,
      values,
      plotted: inUm ? { value: mean, expanded: U } : null,
      published: inUm ? this.published(dimension) : [],
    };
  }

  private published(dimension: string): PublishedRange[] {
    const { structure } = this.series();
    return (this.bench.find()?.publishedSizes ?? [])
      .filter((size) => size.structure === structure && size.dimension === dimension)
      .map((size) => ({
        name: size.taxonName,
        low: size.minUm,
        high: size.maxUm,
        source: [size.source, size.year].filter(Boolean).join(', '),
      }));
  }
}
