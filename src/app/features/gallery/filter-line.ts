import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { mdiClose } from '@mdi/js';
import type { NameView } from '@shared/contracts/common';
import type { TaxonName as Taxon } from '@shared/contracts/taxa';
import { Icon } from '../../ui/icon/icon';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { TaxonPicker } from '../../ui/taxon-picker/taxon-picker';

/** What the wall is narrowed to, each with a way to take it off, and a field to narrow it to a taxon. */
@Component({
  selector: 'app-filter-line',
  imports: [RouterLink, Icon, TaxonName, TaxonPicker],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <app-taxon-picker i18n-label label="Only this taxon and those below it" (picked)="narrow($event)" />
    @if (taxonId()) {
      <a class="chip" routerLink="/" [queryParams]="{ q: q() }" i18n-aria-label aria-label="Take the taxon off">
        @if (taxonName(); as name) {
          <app-taxon-name [name]="name" />
        } @else {
          <span i18n>One taxon</span>
        }
        <app-icon [path]="close" />
      </a>
    }
    @if (q()) {
      <a
        class="chip"
        routerLink="/"
        [queryParams]="{ taxon: taxonId() }"
        i18n-aria-label
        aria-label="Take the words off"
      >
        <span>“{{ q() }}”</span>
        <app-icon [path]="close" />
      </a>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 10px;
      margin: 18px 0 22px;
    }
    app-taxon-picker {
      flex: 0 1 320px;
    }
    .chip {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      min-height: 44px;
      padding: 0 10px 0 14px;
      color: var(--ink);
      background: var(--label);
      border: 1px solid var(--line-strong);
      border-radius: 2px;
      text-decoration: none;
    }
    .chip:hover {
      border-color: var(--rust);
    }
    .chip app-icon {
      width: 18px;
      height: 18px;
      color: var(--ink-soft);
    }
  `,
})
export class FilterLine {
  private readonly router = inject(Router);
  protected readonly close = mdiClose;

  readonly q = input<string>();
  readonly taxonId = input<string>();
  readonly taxonName = input<NameView | null>(null);

  protected narrow(taxon: Taxon): void {
    void this.router.navigate(['/'], { queryParams: { taxon: taxon.id, q: this.q() || undefined } });
  }
}
