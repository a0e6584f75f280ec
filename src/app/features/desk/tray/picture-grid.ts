import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  type ElementRef,
  inject,
  Injector,
  input,
  model,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { mdiCheckBold } from '@mdi/js';
import type { TrayPicture } from '@shared/contracts/images';
import { dayWords } from '../../../core/day-words';
import { Icon } from '../../../ui/icon/icon';
import { Picture } from '../../../ui/picture/picture';
import { byteWords } from './byte-words';
import type { TrayGroup } from './groups';
import { LIGHT_WORDS } from './light-words';
import { choose, extendTo, NOTHING, step, toggle, type Selection, type Step } from './selection';

const STEPS: Readonly<Record<string, Step>> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
  Home: 'rowStart',
  End: 'rowEnd',
};

/**
 * The tray's pictures in their suggested groups, to choose from: a touch chooses one or lets it go, shift
 * and a touch (or an arrow key) chooses up to there, Ctrl+A all, Escape none.
 */
@Component({
  selector: 'app-picture-grid',
  imports: [MatButtonModule, Icon, Picture],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './picture-grid.html',
  styleUrl: './picture-grid.scss',
})
export class PictureGrid {
  private readonly injector = inject(Injector);
  private readonly grid = viewChild.required<ElementRef<HTMLElement>>('grid');

  readonly groups = input.required<readonly TrayGroup[]>();
  readonly selection = model<Selection>(NOTHING);
  /** a find is wanted of the pictures that are chosen now */
  readonly makeFind = output<void>();

  protected readonly icons = { check: mdiCheckBold };
  protected readonly lightWords = LIGHT_WORDS;
  protected readonly dayWords = dayWords;
  protected readonly bytes = byteWords;
  protected readonly columns = signal(4);
  protected readonly focusedId = signal<string | null>(null);

  /** The groups cut into the rows that are seen, for the keyboard and for screen readers. */
  protected readonly laidOut = computed(() =>
    this.groups().map((group) => ({ ...group, rows: inRows(group.pictures, this.columns()) })),
  );
  private readonly rows = computed(() =>
    this.laidOut().flatMap((group) => group.rows.map((row) => row.map(({ id }) => id))),
  );
  private readonly order = computed(() => this.rows().flat());
  /** the one cell that Tab reaches */
  protected readonly focused = computed(() => {
    const id = this.focusedId();
    return id !== null && this.order().includes(id) ? id : (this.order()[0] ?? null);
  });

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      if (typeof ResizeObserver === 'undefined') return;
      const observer = new ResizeObserver(() => this.countColumns());
      observer.observe(this.grid().nativeElement);
      destroyed.onDestroy(() => observer.disconnect());
    });
  }

  /** To where one was, or to the first: after a form has closed and its pictures are gone. */
  focus(): void {
    // Only then are they gone: which cell is the first is not known before.
    afterNextRender(
      () => {
        const id = this.focused();
        if (id !== null) this.focusCell(id);
        else this.grid().nativeElement.focus();
      },
      { injector: this.injector },
    );
  }

  protected touch(event: Event, id: string): void {
    event.preventDefault();
    const extended = (event as MouseEvent | KeyboardEvent).shiftKey;
    this.selection.update((now) => (extended ? extendTo(now, id, this.order()) : toggle(now, id)));
    this.focusedId.set(id);
  }

  protected chooseGroup(group: TrayGroup): void {
    this.selection.set(choose(group.pictures.map(({ id }) => id)));
  }

  protected press(event: KeyboardEvent): void {
    if (event.key === 'a' && (event.ctrlKey || event.metaKey)) {
      event.preventDefault();
      this.selection.set(choose(this.order()));
      return;
    }
    if (event.key === 'Escape') return this.selection.set(NOTHING);
    const to = this.stepOf(event);
    const id = this.focused();
    if (!to || id === null || !(event.target as HTMLElement).classList.contains('tile')) return;
    event.preventDefault();
    const next = step(this.rows(), this.positionOf(id), to);
    const nextId = this.rows()[next.row]?.[next.column];
    if (nextId === undefined) return;
    if (event.shiftKey) {
      this.selection.update((now) => extendTo(now.anchor === null ? toggle(now, id) : now, nextId, this.order()));
    }
    this.focusCell(nextId);
  }

  /** `10:42–10:58` */
  protected timesOf({ from, to }: TrayGroup): string {
    return from === to ? (from ?? '') : `${from}–${to}`;
  }

  protected labelOf(picture: TrayPicture): string {
    const when = picture.capture?.local?.replace('T', ' ').slice(0, 16);
    return [picture.name, when].filter(Boolean).join(', ');
  }

  private stepOf(event: KeyboardEvent): Step | undefined {
    if (event.ctrlKey && event.key === 'Home') return 'first';
    if (event.ctrlKey && event.key === 'End') return 'last';
    return STEPS[event.key];
  }

  private positionOf(id: string): { row: number; column: number } {
    const row = this.rows().findIndex((ids) => ids.includes(id));
    return { row, column: this.rows()[row]?.indexOf(id) ?? 0 };
  }

  private focusCell(id: string): void {
    this.focusedId.set(id);
    // After its tabindex is 0 on the page.
    afterNextRender(
      () =>
        this.grid()
          .nativeElement.querySelector<HTMLElement>(`#${CSS.escape(`tray-${id}`)}`)
          ?.focus(),
      { injector: this.injector },
    );
  }

  private countColumns(): void {
    const tiles = this.grid().nativeElement.querySelector('.tiles');
    if (!tiles) return;
    this.columns.set(Math.max(1, getComputedStyle(tiles).gridTemplateColumns.split(' ').length));
  }
}

function inRows<T>(all: readonly T[], columns: number): T[][] {
  return Array.from({ length: Math.ceil(all.length / columns) }, (_, row) =>
    all.slice(row * columns, (row + 1) * columns),
  );
}
