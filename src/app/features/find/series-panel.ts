import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { findRoutes, type FindView } from '@shared/contracts/finds';
import { seriesRoutes } from '@shared/contracts/series';
import { Api, pathOf } from '../../core/api';
import { fruitBodyCount } from '../../core/count-words';
import { Submission } from '../../core/submission';
import { Quantity } from '../../ui/quantity/quantity';
import { StripPlot } from '../../ui/strip-plot/strip-plot';
import { seriesCard } from './series-card';

/** What was measured, series by series: preparations are never silently pooled. */
@Component({
  selector: 'app-series-panel',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, Quantity, StripPlot],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './series-panel.html',
  styleUrls: ['./panel.scss', './series-panel.scss'],
})
export class SeriesPanel {
  private readonly api = inject(Api);

  readonly find = input.required<FindView>();
  readonly changed = output<FindView>();

  protected readonly cards = computed(() =>
    this.find().series.map((series) => ({
      ...seriesCard(series, this.find()),
      csv: pathOf(seriesRoutes.csv, { params: { seriesId: series.id } }),
    })),
  );
  protected readonly hasSpores = computed(() => this.cards().some((card) => card.notation !== null));
  protected readonly fruitBodies = computed(() => fruitBodyCount(this.find().fruitBodies));
  protected readonly counting = signal(false);
  protected readonly submission = new Submission();

  protected saveFruitBodies(fruitBodies: number): void {
    const request = this.api.call(findRoutes.edit, { params: { findId: this.find().id }, body: { fruitBodies } });
    this.submission.send(request, (find) => {
      this.counting.set(false);
      this.changed.emit(find);
    });
  }
}
