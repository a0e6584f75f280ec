import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ImageTile } from '@shared/contracts/images';
import { ScaleBar } from '../scale-bar/scale-bar';

/**
 * A picture with its true bar, in the width of its place. Its height is known before it loads, and
 * its own colours stand there until it has.
 *
 * A `frame` (width over height; a style sheet may set it as `--frame`) that is flatter than the picture cuts it above and below;
 * a narrower one is not used, since cutting at the sides would make the bar's share of the width a lie.
 */
@Component({
  selector: 'app-picture',
  imports: [ScaleBar],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <img
      [attr.loading]="first() ? 'eager' : 'lazy'"
      [src]="src()"
      [srcset]="srcset()"
      [sizes]="sizes()"
      [width]="tile().width"
      [height]="tile().height"
      [alt]="tile().altText || otherwise()"
      [attr.fetchpriority]="first() ? 'high' : null"
      decoding="async"
    />
    @if (bar()) {
      <app-scale-bar [scale]="tile().scale" [imageWidth]="tile().width" />
    }
  `,
  styles: `
    :host {
      position: relative;
      display: block;
      overflow: hidden;
      aspect-ratio: max(var(--aspect), var(--frame, 0));
    }
    img {
      width: 100%;
      height: 100%;
      object-fit: cover;
    }
  `,
  host: { '[style.--aspect]': 'aspect()', '[style.--frame]': 'frame()', '[style.background]': 'colours()' },
})
export class Picture {
  readonly tile = input.required<ImageTile>();
  /** how wide it will stand, for the browser's choice of rendition */
  readonly sizes = input('100vw');
  readonly bar = input(true);
  /** stands in for words that nobody has written; needed where the picture alone names a link */
  readonly otherwise = input('');
  /** seen at once: loaded first, not when it comes near */
  readonly first = input(false);
  readonly frame = input<number | null>(null);

  private readonly widths = computed(() => this.tile().renditionWidths.toSorted((a, b) => a - b));
  protected readonly src = computed(() => renditionUrl(this.tile(), middleOf(this.widths())));
  protected readonly srcset = computed(() =>
    this.widths()
      .map((width) => `${renditionUrl(this.tile(), width)} ${width}w`)
      .join(', '),
  );
  protected readonly aspect = computed(() => this.tile().width / this.tile().height);
  protected readonly colours = computed(() => placeholder(this.tile().colours));
}

/** Where a rendition lies; its address changes with the picture's revision, so it can be kept for ever. */
export function renditionUrl(tile: Pick<ImageTile, 'id' | 'revision'>, width: number): string {
  return `/renditions/${tile.id}~${tile.revision}/${width}.webp`;
}

/** The picture's own colours from left to right. Anything that is not a plain colour is left out. */
export function placeholder(colours: readonly string[]): string {
  const plain = colours.filter((colour) => /^#[0-9a-f]{6}$/i.test(colour));
  if (plain.length < 2) return plain[0] ?? 'var(--line)';
  return `linear-gradient(90deg, ${plain.join(', ')})`;
}

function middleOf(widths: readonly number[]): number {
  return widths[Math.floor(widths.length / 2)] ?? 800;
}
