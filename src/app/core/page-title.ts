import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** "Sorting tray · Motebook". A route without a title is a page that says its own once it knows it (`PageMeta`). */
@Injectable()
export class PageTitleStrategy extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(state: RouterStateSnapshot): void {
    const own = this.buildTitle(state);
    if (own) this.title.setTitle(`${own} · Motebook`);
  }
}
