import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { PublishedSizeView } from '@shared/contracts/finds';
import { rangeWords } from '../../core/range-words';
import { fullSource, pageWords } from '../../core/source-words';
import { structureWords } from '../../core/structure-words';

/** What books say, with the book: what is not known of a printed size is said to be unknown. */
@Component({
  selector: 'app-published-sizes',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (rows().length > 0) {
      <div class="scroll" role="region" tabindex="0" i18n-aria-label aria-label="Published sizes">
        <table>
          <thead>
            <tr>
              <th scope="col" i18n>Structure</th>
              <th scope="col" class="number" i18n>Size</th>
              <th scope="col" i18n>Source</th>
              <th scope="col" i18n>Page</th>
            </tr>
          </thead>
          <tbody>
            @for (row of rows(); track row.id) {
              <tr>
                <th scope="row">
                  {{ row.structure }}<br /><span class="soft">{{ row.dimension }}</span>
                </th>
                <td class="number numbers">{{ row.range }}</td>
                <td>
                  {{ row.source }}
                  @if (!row.seen) {
                    <br /><span class="memory" i18n>from memory; not yet checked against the book</span>
                  }
                </td>
                <td class="numbers">{{ row.page }}</td>
              </tr>
            }
          </tbody>
        </table>
      </div>
    } @else {
      <p class="soft" i18n>No published size of it is in the list, so nothing measured here can be held against one.</p>
    }
  `,
  styles: `
    .scroll {
      overflow-x: auto;
    }
    table {
      width: 100%;
      border-collapse: collapse;
    }
    th,
    td {
      padding: 8px 16px 8px 0;
      text-align: left;
      vertical-align: top;
      font-weight: 400;
      border-bottom: 1px solid var(--line);
    }
    thead th {
      color: var(--ink-soft);
      border-color: var(--ink);
    }
    .number {
      text-align: right;
      white-space: nowrap;
    }
    .memory {
      color: var(--lichen-ink);
      font-size: 0.9375rem;
    }
  `,
})
export class PublishedSizes {
  readonly sizes = input.required<readonly PublishedSizeView[]>();

  protected readonly rows = computed(() =>
    this.sizes().map(({ id, structure, dimension, minUm, maxUm, source, year, page, seen }) => ({
      id,
      structure: structureWords(structure),
      dimension: dimension === 'length' ? $localize`along` : $localize`across`,
      range: rangeWords(minUm, maxUm),
      source: fullSource(source, year),
      page: pageWords(page),
      seen,
    })),
  );
}
