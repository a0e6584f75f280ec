import { isPlatformBrowser } from '@angular/common';
import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  ElementRef,
  inject,
  input,
  output,
  PLATFORM_ID,
  viewChild,
} from '@angular/core';
import type { GalleryTile } from '@shared/contracts/gallery';
import { Each, Justified } from '../../ui/justified/justified';
import { TileLink } from '../../ui/tile-link/tile-link';

/** The wall of pictures: says when its end comes near, and which picture one has come to. */
@Component({
  selector: 'app-wall',
  imports: [Each, Justified, TileLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <app-justified>
      <ng-template [appEach]="tiles()" let-tile let-i="index">
        <app-tile-link [tile]="tile" [first]="i < 2" />
      </ng-template>
    </app-justified>
    <div #end aria-hidden="true"></div>
  `,
})
export class Wall {
  readonly tiles = input.required<readonly GalleryTile[]>();
  /** there is nothing more to come */
  readonly complete = input(true);
  /** the end comes near: time to ask for more */
  readonly nearEnd = output<void>();
  /** the tile that is now uppermost in sight */
  readonly placed = output<GalleryTile>();

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly end = viewChild.required<ElementRef<HTMLElement>>('end');

  constructor() {
    if (!isPlatformBrowser(inject(PLATFORM_ID))) return;
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      const stopWatching = [this.watchEnd(), this.watchPlace()];
      destroyed.onDestroy(() => stopWatching.forEach((stop) => stop()));
    });
  }

  private watchEnd(): () => void {
    if (typeof IntersectionObserver === 'undefined') return () => undefined;
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting) && !this.complete()) this.nearEnd.emit();
      },
      { rootMargin: '0px 0px 1200px' },
    );
    observer.observe(this.end().nativeElement);
    return () => observer.disconnect();
  }

  /** After scrolling has come to rest, since each change of the address costs the browser something. */
  private watchPlace(): () => void {
    let timer: ReturnType<typeof setTimeout> | undefined;
    const place = () => {
      const items = Array.from(this.host.nativeElement.querySelectorAll('li'));
      const at = items.findIndex((item) => item.getBoundingClientRect().bottom > 0);
      const tile = this.tiles()[at];
      if (tile) this.placed.emit(tile);
    };
    const scrolled = () => {
      clearTimeout(timer);
      timer = setTimeout(place, 200);
    };
    window.addEventListener('scroll', scrolled, { passive: true });
    return () => {
      clearTimeout(timer);
      window.removeEventListener('scroll', scrolled);
    };
  }
}
