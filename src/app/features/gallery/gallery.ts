import { Location } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input, untracked } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { galleryRoutes, type GalleryTile } from '@shared/contracts/gallery';
import { taxonRoutes } from '@shared/contracts/taxa';
import { Api } from '../../core/api';
import { pictureCount } from '../../core/count-words';
import { nameWords } from '../../core/name-words';
import { PageMeta } from '../../core/page-meta';
import { Empty } from '../../ui/empty/empty';
import { renditionUrl } from '../../ui/picture/picture';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { FilterLine } from './filter-line';
import { GalleryStore, type GalleryFilter } from './gallery-store';
import { Hero } from './hero';
import { heroOf } from './hero-of';
import { NearNames } from './near-names';
import { Wall } from './wall';
import { WallSkeleton } from './wall-skeleton';

/** The public gallery: the newest picture large, and below it the wall. What is looked for stands in the address. */
@Component({
  selector: 'app-gallery',
  imports: [
    MatButtonModule,
    RouterLink,
    Empty,
    FilterLine,
    Hero,
    NearNames,
    ProblemBox,
    Rule,
    TaxonName,
    Wall,
    WallSkeleton,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './gallery.html',
  styleUrl: './gallery.scss',
})
export class Gallery {
  private readonly store = inject(GalleryStore);
  private readonly location = inject(Location);
  private readonly router = inject(Router);

  /** from the address */
  readonly taxon = input<string>();
  readonly q = input<string>();
  readonly after = input<string>();

  private readonly filter = computed<GalleryFilter>(() => {
    const [taxon, q] = [this.taxon(), this.q()?.trim()];
    return { ...(taxon ? { taxon } : {}), ...(q ? { q } : {}) };
  });
  /** what is searched for, as it was typed */
  protected readonly words = computed(() => this.filter().q ?? null);
  protected readonly filtered = computed(() => Object.keys(this.filter()).length > 0);
  private readonly held = computed(() => this.store.holds(this.filter(), this.after() ?? null));

  protected readonly first = inject(Api).resource(galleryRoutes.page, () =>
    this.held() ? undefined : { query: { ...this.filter(), after: this.after() } },
  );
  private readonly taxonView = inject(Api).resource(taxonRoutes.read, () => {
    const taxonId = this.taxon();
    return taxonId ? { params: { taxonId } } : undefined;
  });
  /** The name on the filter's chip; null until it is known, or when there is no such taxon. */
  protected readonly taxonName = computed(() => (this.taxonView.hasValue() ? this.taxonView.value().name : null));

  private readonly firstPage = computed(() => (this.first.hasValue() ? this.first.value() : null));
  private readonly tiles = computed(() => (this.held() ? this.store.tiles() : (this.firstPage()?.tiles ?? [])));
  private readonly total = computed(() => (this.held() ? this.store.total() : (this.firstPage()?.total ?? 0)));
  protected readonly count = computed(() => pictureCount(this.total()));
  protected readonly next = computed(() => (this.held() ? this.store.next() : (this.firstPage()?.next ?? null)));
  protected readonly state = computed(() => {
    if (this.held() || this.first.hasValue()) return this.tiles().length > 0 ? 'wall' : 'empty';
    return this.first.error() ? 'problem' : 'loading';
  });

  /** A wall that was kept may begin before the place that the address names. */
  protected readonly fromNewest = computed(() => (this.held() ? this.store.from() : (this.after() ?? null)) === null);
  /** Only where the wall begins, and not over a search: there every picture counts the same. */
  protected readonly hero = computed(() => (this.filtered() || !this.fromNewest() ? null : heroOf(this.tiles())));
  protected readonly wall = computed(() => this.tiles().filter((tile) => tile !== this.hero()));

  protected readonly isLoadingMore = this.store.isLoadingMore;
  protected readonly moreProblem = this.store.moreProblem;

  constructor() {
    // A click on "Gallery" asks for what is new; the way back asks for what was there.
    if (this.router.currentNavigation()?.trigger !== 'popstate') this.store.forget();
    effect(() => {
      const page = this.firstPage();
      if (page) untracked(() => this.store.begin(this.filter(), this.after() ?? null, page));
    });
    this.describe(inject(PageMeta));
  }

  protected more(): void {
    void this.store.more();
  }

  /** Keeps the place in the address, so that it can be reloaded, sent and come back to. */
  protected keepPlace(tile: GalleryTile): void {
    const after = this.store.cursorAt(this.tiles().indexOf(tile));
    const tree = this.router.createUrlTree(['/'], { queryParams: { ...this.filter(), ...(after ? { after } : {}) } });
    const url = this.router.serializeUrl(tree);
    // Not through the router: this is no navigation. Its state goes along, by which it knows where one had scrolled to.
    if (url !== this.location.path()) this.location.replaceState(url, '', this.location.getState());
  }

  private describe(meta: PageMeta): void {
    effect(() => {
      const cover = this.hero() ?? this.tiles()[0] ?? null;
      const [name, words] = [this.taxonName(), this.words()];
      meta.describe({
        title: [...(name ? [nameWords(name)] : []), ...(words ? [`“${words}”`] : [])].join(', ') || 'Motebook',
        description: $localize`A gallery of very small living things in which every picture carries a scale that can be trusted.`,
        image: cover ? renditionUrl(cover, Math.max(...cover.renditionWidths, 0)) : null,
      });
    });
  }
}
