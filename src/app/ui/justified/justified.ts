import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  contentChild,
  Directive,
  inject,
  input,
  TemplateRef,
} from '@angular/core';
import { justify } from './justify';

/** What is laid out: a picture has its size before it loads. */
export interface Sized {
  readonly id: string;
  readonly width: number;
  readonly height: number;
}

interface EachContext<T> {
  readonly $implicit: T;
  readonly index: number;
}

/** `<ng-template [appEach]="tiles()" let-tile>`: the things of a wall, and how one of them is drawn. */
@Directive({ selector: 'ng-template[appEach]' })
export class Each<T extends Sized> {
  readonly appEach = input.required<readonly T[]>();
  readonly template = inject<TemplateRef<EachContext<T>>>(TemplateRef);

  static ngTemplateContextGuard<T extends Sized>(_each: Each<T>, _context: unknown): _context is EachContext<T> {
    return true;
  }
}

/** Wanted width over height of a row, for a phone, a tablet, a laptop and a wide screen; `justified.scss` has the widths. */
export interface RowAspects {
  readonly s: number;
  readonly m: number;
  readonly l: number;
  readonly xl: number;
}

/**
 * Pictures in rows of equal height that fill the width. Each carries its place in four such walls, one
 * per width of its room, and the style sheet takes the one that fits: no script lays it out, the server
 * draws what the browser will, and nothing shifts.
 */
@Component({
  selector: 'app-justified',
  imports: [NgTemplateOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ul>
      @for (placed of places(); track placed.item.id) {
        <li [style]="placed.style">
          <ng-container [ngTemplateOutlet]="each().template" [ngTemplateOutletContext]="placed.context" />
        </li>
      }
    </ul>
  `,
  styleUrl: './justified.scss',
})
export class Justified {
  readonly rows = input<RowAspects>({ s: 1.5, m: 3, l: 4.3, xl: 6 });

  protected readonly each = contentChild.required<Each<Sized>>(Each);
  protected readonly places = computed(() => {
    const items = this.each().appEach();
    const aspects = items.map((item) => item.width / item.height);
    const walls = Object.entries(this.rows()).map(([size, rowAspect]: [string, number]) => ({
      size,
      places: justify(aspects, rowAspect),
    }));
    return items.map((item, index) => ({
      item,
      context: { $implicit: item, index },
      style: walls
        .map(({ size, places }) => `--n-${size}:${places[index]?.inRow ?? 1};--w-${size}:${places[index]?.share ?? 1}`)
        .join(';'),
    }));
  });
}
