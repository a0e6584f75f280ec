import { ChangeDetectionStrategy, Component, computed, effect, inject } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { taxonRoutes, type TaxonName as Taxon } from '@shared/contracts/taxa';
import { Api } from '../../core/api';
import { PageMeta } from '../../core/page-meta';
import { Empty } from '../../ui/empty/empty';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { TaxonPicker } from '../../ui/taxon-picker/taxon-picker';
import { taxonTree } from './taxon-tree';
import { TaxonBranch } from './taxon-branch';

/** All taxa as a tree, with how many public pictures each has. */
@Component({
  selector: 'app-taxa',
  imports: [RouterLink, Empty, ProblemBox, Rule, TaxonBranch, TaxonPicker],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="page">
      <h1 class="page-title" i18n>Taxa</h1>
      <app-rule />
      <app-taxon-picker i18n-label label="Search for a name" (picked)="open($event)" />
      @if (names.hasValue()) {
        @if (tree().length > 0) {
          <app-taxon-branch [nodes]="tree()" />
        } @else {
          <app-empty>
            <p i18n>The list of taxa is empty.</p>
            <a routerLink="/" i18n>To the gallery</a>
          </app-empty>
        }
      } @else if (names.error()) {
        <app-problem [problem]="names.error()" [retry]="true" (again)="names.reload()" />
      } @else {
        <p class="soft" role="status" i18n>The names are being fetched…</p>
      }
    </div>
  `,
  styles: `
    app-taxon-picker {
      max-width: 420px;
      margin: 24px 0;
    }
  `,
})
export class Taxa {
  private readonly router = inject(Router);
  protected readonly names = inject(Api).resource(taxonRoutes.names, () => ({}));
  protected readonly tree = computed(() => taxonTree(this.names.hasValue() ? this.names.value() : []));

  constructor() {
    const meta = inject(PageMeta);
    effect(() =>
      meta.describe({
        title: $localize`Taxa`,
        description: $localize`The taxa of this gallery, with their published sizes and their pictures.`,
        image: null,
      }),
    );
  }

  protected open(taxon: Taxon): void {
    void this.router.navigate(['/taxa', taxon.id]);
  }
}
