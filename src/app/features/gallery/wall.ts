import { isPlatformBrowser } from '@angular/common';
import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  output,
  PLATFORM_ID,
  viewChild,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import type { GalleryTile } from '@shared/contracts/gallery';
import { lightWords } from '../../core/light-words';
import { Picture } from '../../ui/picture/picture';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { justify } from './justify';

/** Wanted width over height of a row, for a phone, a tablet, a laptop and a wide screen (`wall.scss` has the widths). */
const ROW_ASPECTS = { s: 1.5, m: 3, l: 4.3, xl: 6 } as const;

/**
 * The wall of pictures. Every tile carries its place in four walls, one per width of screen, and the
 * style sheet takes the one that fits: no script lays it out, so nothing shifts.
 */
@Component({
  selector: 'app-wall',
  imports: [RouterLink, Picture, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './wall.html',
  styleUrl: './wall.scss',
})
export class Wall {
  readonly tiles = input.required<readonly GalleryTile[]>();
  /** there is nothing more to come */
  readonly complete = input(true);
  /** the end comes near: time to ask for more */
  readonly nearEnd = output<void>();
  /** the tile that is now uppermost in sight */
  readonly placed = output<GalleryTile>();

  private readonly end = viewChild.required<ElementRef<HTMLElement>>('end');
  private readonly list = viewChild.required<ElementRef<HTMLElement>>('list');

  protected readonly placedTiles = computed(() => {
    const tiles = this.tiles();
    const aspects = tiles.map((tile) => tile.width / tile.height);
    const { s, m, l, xl } = ROW_ASPECTS;
    const walls = { s: justify(aspects, s), m: justify(aspects, m), l: justify(aspects, l), xl: justify(aspects, xl) };
    return tiles.map((tile, i) => ({
      tile,
      light: lightWords(tile.light),
      places: Object.entries(walls)
        .flatMap(([size, places]) => [`--n-${size}:${places[i]?.inRow ?? 1}`, `--w-${size}:${places[i]?.share ?? 1}`])
        .join(';'),
    }));
  });

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
      const items = Array.from(this.list().nativeElement.children);
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
