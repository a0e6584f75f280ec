import { inject, Injectable } from '@angular/core';
import { Meta, Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** "Sorting tray · Motebook"; the gallery is Motebook itself. Pages that know better use `PageMeta`. */
@Injectable()
export class PageTitleStrategy extends TitleStrategy {
  private readonly title = inject(Title);
  private readonly meta = inject(Meta);

  override updateTitle(state: RouterStateSnapshot): void {
    const own = this.buildTitle(state);
    this.title.setTitle(own ? `${own} · Motebook` : 'Motebook');
    for (const property of ['og:title', 'og:description', 'og:image']) this.meta.removeTag(`property="${property}"`);
    this.meta.removeTag('name="description"');
  }
}
