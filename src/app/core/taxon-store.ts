import { computed, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import { taxonRoutes, type TaxonName } from '@shared/contracts/taxa';
import { firstValueFrom } from 'rxjs';
import { Api } from './api';
import { toApiProblem, type ApiProblem } from './api-problem';

const RECENT = 'recent-taxa';
const RECENT_KEPT = 6;
const SHOWN = 12;

/** The list of taxa, fetched once when it is first needed, and searched forgivingly. */
@Injectable({ providedIn: 'root' })
export class TaxonStore {
  private readonly api = inject(Api);
  private readonly storage = inject(DOCUMENT).defaultView?.localStorage;
  private asked: Promise<void> | null = null;
  private readonly list = signal<readonly TaxonName[] | null>(null);
  private readonly failed = signal<ApiProblem | null>(null);
  private readonly recentIds = signal<readonly string[]>(this.storedRecent());

  /** null until it has come */
  readonly names = this.list.asReadonly();
  readonly problem = this.failed.asReadonly();
  private readonly byId = computed(() => new Map(this.list()?.map((taxon) => [taxon.id, taxon])));
  /** those last chosen, the newest first */
  readonly recent = computed(() => this.recentIds().flatMap((id) => this.byId().get(id) ?? []));

  load(): Promise<void> {
    this.asked ??= firstValueFrom(this.api.call(taxonRoutes.names, {})).then(
      (names) => {
        this.list.set(names);
        this.failed.set(null);
      },
      (error: unknown) => {
        this.failed.set(toApiProblem(error));
        this.asked = null; // the next one to need it asks again
      },
    );
    return this.asked;
  }

  /** Names like these words, the likest first; slips of the pen are forgiven. */
  async search(words: string): Promise<readonly TaxonName[]> {
    await this.load();
    const list = this.list() ?? [];
    const { default: Fuse } = await import('fuse.js');
    const fuse = new Fuse(list, {
      keys: [{ name: 'name', weight: 5 }, 'authorship'],
      threshold: 0.35,
      ignoreLocation: true,
      ignoreDiacritics: true,
    });
    return fuse.search(words.trim(), { limit: SHOWN }).map(({ item }) => item);
  }

  /** The taxon whose name is in use now: a synonym leads to it. */
  accepted(taxon: TaxonName): TaxonName {
    return (taxon.acceptedId && this.byId().get(taxon.acceptedId)) || taxon;
  }

  remember(taxon: TaxonName): void {
    this.recentIds.update((ids) => [taxon.id, ...ids.filter((id) => id !== taxon.id)].slice(0, RECENT_KEPT));
    try {
      this.storage?.setItem(RECENT, JSON.stringify(this.recentIds()));
    } catch {
      // Storage may be full or closed; the choice is then forgotten with the page.
    }
  }

  private storedRecent(): readonly string[] {
    try {
      const kept: unknown = JSON.parse(this.storage?.getItem(RECENT) ?? '[]');
      return Array.isArray(kept) ? kept.filter((id) => typeof id === 'string') : [];
    } catch {
      return [];
    }
  }
}
