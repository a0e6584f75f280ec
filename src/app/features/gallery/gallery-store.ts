import { computed, inject, Injectable, signal } from '@angular/core';
import type { GalleryPage, GalleryTile } from '@shared/contracts/gallery';
import { galleryRoutes } from '@shared/contracts/gallery';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api';
import { SessionStore } from '../../core/session-store';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';

export interface GalleryFilter {
  readonly taxon?: string;
  readonly q?: string;
}

/** A page of the wall, with the cursor that it was asked by (null: from the newest on). */
interface Page {
  readonly after: string | null;
  readonly page: GalleryPage;
}

/**
 * The pages of the wall that have been looked at, kept while one is away at a find: on the way back the
 * wall stands as it was, and the browser's place in it is true again.
 */
@Injectable({ providedIn: 'root' })
export class GalleryStore {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly key = signal('');
  private readonly pages = signal<readonly Page[]>([]);
  private filter: GalleryFilter = {};

  private readonly loadingMore = signal(false);
  private readonly problemOfMore = signal<ApiProblem | null>(null);

  readonly tiles = computed<readonly GalleryTile[]>(() => this.pages().flatMap(({ page }) => page.tiles));
  /** the cursor where it begins; null for the newest */
  readonly from = computed(() => this.pages()[0]?.after ?? null);
  readonly total = computed(() => this.pages()[0]?.page.total ?? 0);
  readonly next = computed(() => this.pages().at(-1)?.page.next ?? null);
  readonly isLoadingMore = this.loadingMore.asReadonly();
  readonly moreProblem = this.problemOfMore.asReadonly();

  /** Whether the wall that is kept holds this place: then it is shown as it is. */
  holds(filter: GalleryFilter, after: string | null): boolean {
    return this.key() === this.keyOf(filter) && this.pages().some((page) => page.after === after);
  }

  /** The first page of another wall, or of the same one from another place. */
  begin(filter: GalleryFilter, after: string | null, page: GalleryPage): void {
    this.filter = filter;
    this.key.set(this.keyOf(filter));
    this.pages.set([{ after, page }]);
    this.problemOfMore.set(null);
  }

  /** Lets the kept wall go: the next one is asked for anew. */
  forget(): void {
    this.key.set('');
    this.pages.set([]);
    this.problemOfMore.set(null);
  }

  async more(): Promise<void> {
    const after = this.next();
    if (after === null || this.loadingMore()) return;
    const key = this.key();
    this.loadingMore.set(true);
    this.problemOfMore.set(null);
    try {
      const page = await firstValueFrom(this.api.call(galleryRoutes.page, { query: { ...this.filter, after } }));
      // Meanwhile somebody may have changed the filter: this page then belongs to no wall.
      if (this.key() === key && this.next() === after) this.pages.update((pages) => [...pages, { after, page }]);
    } catch (error) {
      if (this.key() === key) this.problemOfMore.set(toApiProblem(error));
    } finally {
      this.loadingMore.set(false);
    }
  }

  /** The cursor of the page that the tile at this index is on. */
  cursorAt(index: number): string | null {
    let seen = 0;
    for (const { after, page } of this.pages()) {
      seen += page.tiles.length;
      if (index < seen) return after;
    }
    return this.pages().at(-1)?.after ?? null;
  }

  private keyOf(filter: GalleryFilter): string {
    return JSON.stringify([this.session.user()?.id ?? '', filter.taxon ?? '', filter.q ?? '']);
  }
}
