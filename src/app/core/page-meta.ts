import { DOCUMENT, inject, Injectable, REQUEST_CONTEXT } from '@angular/core';
import { Meta, Title } from '@angular/platform-browser';
import type { RenderContext } from './render-context';

export interface PageCard {
  readonly title: string;
  readonly description: string;
  /** a path of this site */
  readonly image: string | null;
}

/** What a page says of itself to search engines and to those who paste its link. */
@Injectable({ providedIn: 'root' })
export class PageMeta {
  private readonly title = inject(Title);
  private readonly meta = inject(Meta);
  private readonly document = inject(DOCUMENT);
  private readonly context = inject(REQUEST_CONTEXT, { optional: true }) as RenderContext | null;

  describe(card: PageCard): void {
    const title = card.title === 'Motebook' ? card.title : `${card.title} · Motebook`;
    this.title.setTitle(title);
    this.meta.updateTag({ name: 'description', content: card.description });
    this.meta.updateTag({ property: 'og:site_name', content: 'Motebook' });
    this.meta.updateTag({ property: 'og:type', content: 'website' });
    this.meta.updateTag({ property: 'og:title', content: title });
    this.meta.updateTag({ property: 'og:description', content: card.description });
    if (card.image) this.meta.updateTag({ property: 'og:image', content: new URL(card.image, this.publicUrl()).href });
    else this.meta.removeTag('property="og:image"');
  }

  private publicUrl(): string {
    return this.context?.publicUrl ?? this.document.location.origin;
  }
}
