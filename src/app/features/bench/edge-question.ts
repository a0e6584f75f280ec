import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal, untracked } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { MatRadioModule } from '@angular/material/radio';
import type { SeriesView } from '@shared/contracts/series';
import { BenchStore } from './bench-store';

type Edge = SeriesView['edgeRule'];
type Ornament = 'in' | 'out' | 'unsaid';
const ORNAMENTED: ReadonlySet<string> = new Set(['spore', 'thread']);

/**
 * Where the edges of a series were taken. Asked once per series, beside a drawing; until then the series
 * says that it is not known, and nothing waits for the answer.
 */
@Component({
  selector: 'app-edge-question',
  imports: [FormsModule, MatRadioModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './edge-question.html',
  styleUrl: './edge-question.scss',
})
export class EdgeQuestion {
  private readonly bench = inject(BenchStore);
  readonly series = input.required<SeriesView>();

  protected readonly edges: readonly { readonly edge: Edge; readonly words: string }[] = [
    { edge: 'outer', words: $localize`outer edge` },
    { edge: 'middle', words: $localize`middle of the wall` },
    { edge: 'inner', words: $localize`inner edge` },
  ];
  protected readonly ornaments: readonly { readonly ornament: Ornament; readonly words: string }[] = [
    { ornament: 'out', words: $localize`without ornament` },
    { ornament: 'in', words: $localize`with ornament` },
    { ornament: 'unsaid', words: $localize`not said` },
  ];
  /** what grows on the wall is asked of what has a wall; elsewhere there is only the edge */
  protected readonly mayHaveOrnament = computed(
    () => ORNAMENTED.has(this.series().structure) || this.series().ornamentIncluded !== null,
  );
  protected readonly mine = computed(() => this.series().mayMeasure);
  protected readonly ornament = computed<Ornament>(() => {
    const { ornamentIncluded } = this.series();
    if (ornamentIncluded === null) return 'unsaid';
    return ornamentIncluded ? 'in' : 'out';
  });
  protected readonly said = computed(() => {
    const edge = this.edges.find((one) => one.edge === this.series().edgeRule)?.words ?? '';
    const ornament =
      this.ornament() === 'unsaid'
        ? $localize`ornament in or out not said`
        : this.ornaments.find((one) => one.ornament === this.ornament())?.words;
    return this.mayHaveOrnament() ? `${edge}, ${ornament}` : edge;
  });
  private readonly seriesId = computed(() => this.series().id);
  /** open of itself while a spore's ornament was never spoken of; another series asks again */
  protected readonly open = linkedSignal<string, boolean>({
    source: this.seriesId,
    computation: () =>
      untracked(() => this.mine() && this.ornament() === 'unsaid' && this.series().structure === 'spore'),
  });
  /** where the drawing's line stands: half the height of the drawing, from its middle */
  protected readonly reach = computed(() => {
    if (this.ornament() === 'in') return 30;
    return { outer: 25, middle: 22.5, inner: 20 }[this.series().edgeRule];
  });

  protected setEdge(edgeRule: Edge): void {
    this.bench.editSeries(this.series(), { edgeRule });
  }

  protected setOrnament(ornament: Ornament): void {
    this.bench.editSeries(this.series(), { ornamentIncluded: ornament === 'unsaid' ? null : ornament === 'in' });
  }
}
