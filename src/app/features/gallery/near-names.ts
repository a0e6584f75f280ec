import { isPlatformBrowser } from '@angular/common';
import { ChangeDetectionStrategy, Component, inject, input, PLATFORM_ID, resource } from '@angular/core';
import { RouterLink } from '@angular/router';
import { TaxonStore } from '../../core/taxon-store';
import { TaxonName } from '../../ui/taxon-name/taxon-name';

const MOST = 3;

/** Where the words of a search fit no picture: the taxa whose names they may be, slips of the pen forgiven. */
@Component({
  selector: 'app-near-names',
  imports: [RouterLink, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (names.hasValue() && names.value().length > 0) {
      <p i18n>A taxon, perhaps:</p>
      <ul>
        @for (taxon of names.value(); track taxon.id) {
          <li>
            <a [routerLink]="['/taxa', taxon.id]"><app-taxon-name [name]="taxon" /></a>
          </li>
        }
      </ul>
    }
  `,
  styles: `
    :host {
      display: block;
      min-height: 9rem;
    }
    p {
      margin: 24px 0 0;
    }
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    a {
      display: inline-block;
      padding: 8px 0;
    }
  `,
})
export class NearNames {
  readonly words = input.required<string>();

  private readonly taxa = inject(TaxonStore);
  private readonly inBrowser = isPlatformBrowser(inject(PLATFORM_ID));

  /** Looked up in the browser alone: a page from the server need not carry the list of taxa. */
  protected readonly names = resource({
    params: () => (this.inBrowser ? this.words() : undefined),
    loader: async ({ params }) => {
      const found = (await this.taxa.search(params)).map((taxon) => ({ ...this.taxa.accepted(taxon), qualifier: '' }));
      return [...new Map(found.map((taxon) => [taxon.id, taxon])).values()].slice(0, MOST);
    },
  });
}
