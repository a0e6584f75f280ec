import { ChangeDetectionStrategy, Component, computed, effect, inject, input, RESPONSE_INIT } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { taxonRoutes } from '@shared/contracts/taxa';
import { Api } from '../../core/api';
import { toApiProblem } from '../../core/api-problem';
import { pictureCount } from '../../core/count-words';
import { nameWords } from '../../core/name-words';
import { PageMeta } from '../../core/page-meta';
import { rankWords } from '../../core/rank-words';
import { Empty } from '../../ui/empty/empty';
import { Each, Justified } from '../../ui/justified/justified';
import { renditionUrl } from '../../ui/picture/picture';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { TileLink } from '../../ui/tile-link/tile-link';
import { PublishedSizes } from './published-sizes';

/** One taxon: what it is called, where it belongs, what books say of its sizes, and its pictures here. */
@Component({
  selector: 'app-taxon',
  imports: [MatButtonModule, RouterLink, Each, Empty, Justified, ProblemBox, PublishedSizes, Rule, TaxonName, TileLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './taxon.html',
  styleUrl: './taxon.scss',
})
export class Taxon {
  /** from the address */
  readonly taxonId = input.required<string>();

  protected readonly answer = inject(Api).resource(taxonRoutes.read, () => ({ params: { taxonId: this.taxonId() } }));
  protected readonly taxon = computed(() => (this.answer.hasValue() ? this.answer.value() : null));
  protected readonly missing = computed(() => toApiProblem(this.answer.error()).code === 'not-found');
  protected readonly rank = rankWords;
  protected readonly pictureCount = pictureCount;

  constructor() {
    const meta = inject(PageMeta);
    const response = inject(RESPONSE_INIT, { optional: true });
    effect(() => {
      const taxon = this.taxon();
      if (taxon) {
        const name = nameWords(taxon.name);
        const cover = taxon.pictures[0];
        meta.describe({
          title: name,
          description: $localize`Published sizes of ${name} with their sources, and pictures with a scale.`,
          image: cover ? renditionUrl(cover, Math.max(...cover.renditionWidths, 0)) : null,
        });
      }
      if (!this.answer.error()) return;
      if (response) response.status = this.missing() ? 404 : 503;
      meta.describe({ title: $localize`Taxon`, description: '', image: null });
    });
  }
}
