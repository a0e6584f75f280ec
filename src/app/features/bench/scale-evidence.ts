import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ScaleView } from '@shared/contracts/scales';
import { expanded } from '@shared/scale/uncertainty';
import { contributions, evidence, percent } from './scale-words';

/** *How sure is this?*: where the scale comes from, and what its uncertainty consists of. */
@Component({
  selector: 'app-scale-evidence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <dl>
      @for (row of rows(); track row.term) {
        <dt>{{ row.term }}</dt>
        <dd class="numbers">{{ row.said }}</dd>
      }
    </dl>
    @if (parts().length > 0) {
      <h3 i18n>What makes it uncertain (k = 1)</h3>
      <ul>
        @for (part of parts(); track part.words) {
          <li>
            <span>{{ part.words }}</span>
            <span class="numbers">{{ part.percent }}</span>
            <span class="bar" aria-hidden="true" [style.width.%]="part.share"></span>
          </li>
        }
      </ul>
      <p class="numbers" i18n>
        Together ± {{ total() }} at k = 2, about 95 %. Independent parts add as squares: the largest counts nearly
        alone.
      </p>
    }
  `,
  styles: `
    :host {
      display: block;
      margin: 4px 0 10px;
      padding: 10px 12px;
      background: var(--label);
      border-left: 2px solid var(--rust);
      font-size: 0.9375rem;
    }
    dl {
      display: grid;
      gap: 0 10px;
      margin: 0;
    }
    dt {
      color: var(--ink-soft);
      font-size: 0.875rem;
    }
    dd {
      margin: 0 0 6px;
    }
    h3 {
      margin: 6px 0;
      font: 600 0.875rem var(--sans);
      color: var(--ink-soft);
    }
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      display: grid;
      grid-template-columns: 1fr auto;
      gap: 0 10px;
      margin-bottom: 8px;
      line-height: 1.3;
    }
    .bar {
      grid-column: 1 / -1;
      height: 4px;
      margin-top: 4px;
      background: var(--rust);
    }
    p {
      margin: 0;
      color: var(--ink-soft);
      font-size: 0.875rem;
    }
  `,
})
export class ScaleEvidence {
  readonly view = input.required<ScaleView>();

  protected readonly rows = computed(() => evidence(this.view()));
  protected readonly parts = computed(() => {
    const all = contributions(this.view().provenance, this.view().relativeUncertainty ?? 0);
    const largest = all[0]?.relative ?? 1;
    return all.map(({ words, relative }) => ({
      words,
      percent: percent(relative),
      share: Math.max(1, (100 * relative) / largest),
    }));
  });
  protected readonly total = computed(() => percent(expanded(this.view().relativeUncertainty ?? 0)));
}
