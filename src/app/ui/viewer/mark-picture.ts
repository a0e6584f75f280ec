import { ChangeDetectionStrategy, Component, computed, input, model, signal, viewChild } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { mdiClose } from '@mdi/js';
import { px, type ImagePoint, type ViewPoint } from '@shared/geometry/points';
import { Icon } from '../icon/icon';
import { Loupe } from './loupe';
import { paintMarks } from './mark-painter';
import { markAt, offLine, rulingThrough, suggestIndex, type RulingMark } from './marks';
import { PictureCanvas, type PictureGesture } from './picture-canvas';

/** Image px per press of an arrow key: a tenth of a pixel, or one with Shift. */
const NUDGE = { fine: 0.1, coarse: 1 } as const;
/** How near a hand must come to take hold of a mark, in multiples of its unrest. */
const REACH = 4;
/** Image px off the common line from which a mark looks like a slip; common practice, no source. */
const SLIP_PX = 3;

/**
 * A picture on which the graduations of a ruling are marked to a fraction of a pixel: click to mark, drag
 * to move, arrows to nudge, Delete to take away. Each mark has a number that counts graduations, so that
 * some may be skipped.
 *
 * By keyboard: M marks the middle of the view, Tab goes through the marks, arrows nudge (Shift: 1 px).
 */
@Component({
  selector: 'app-mark-picture',
  imports: [PictureCanvas, Loupe, FormsModule, Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './mark-picture.html',
  styleUrl: './mark-picture.scss',
  host: { '(keydown)': 'keyDown($event)', '[attr.data-drawn]': 'canvas().drawn() ? "" : null' },
})
export class MarkPicture {
  readonly imageId = input.required<string>();
  readonly revision = input.required<number>();
  readonly width = input.required<number>();
  readonly height = input.required<number>();
  /** what one graduation is, as people read it: "10 µm"; null while not said */
  readonly spacingLabel = input<string | null>(null);
  /** in the order in which they were set */
  readonly marks = model<readonly RulingMark[]>([]);

  protected readonly canvas = viewChild.required(PictureCanvas);
  protected readonly close = mdiClose;
  protected readonly selected = signal<number | null>(null);
  protected readonly pointer = signal<ViewPoint | null>(null);
  protected readonly painter = computed(() => paintMarks(this.marks(), this.selected()));
  /** of the mark that is being dragged: from where the hand took hold to the mark itself */
  private hold: { readonly dx: number; readonly dy: number } | null = null;

  protected readonly rows = computed(() => {
    const line = rulingThrough(this.marks());
    return this.marks()
      .map((mark, place) => ({ mark, place, slip: line !== null && offLine(mark, line) > SLIP_PX }))
      .sort((a, b) => a.mark.index - b.mark.index);
  });
  protected readonly pixels = computed(() => (this.pointer() ? this.canvas().pixels : null));
  protected readonly takesHold = (at: ImagePoint, slop: number) => markAt(this.marks(), at, slop * REACH) !== null;

  protected gesture(gesture: PictureGesture): void {
    this.pointer.set(gesture.type === 'release' || gesture.type === 'abort' ? null : gesture.view);
    const { at, slop } = gesture;
    if (gesture.type === 'click') this.add(at);
    if (gesture.type === 'press') {
      const place = markAt(this.marks(), at, slop * REACH);
      const mark = place === null ? undefined : this.marks()[place];
      this.selected.set(place);
      this.hold = mark ? { dx: mark.at.x - at.x, dy: mark.at.y - at.y } : null;
    }
    if (gesture.type === 'drag' && this.hold) this.moveSelected(px(at.x + this.hold.dx, at.y + this.hold.dy));
    if (gesture.type === 'release' || gesture.type === 'abort') this.hold = null;
  }

  protected add(at: ImagePoint): void {
    const inside = px(Math.min(this.width(), Math.max(0, at.x)), Math.min(this.height(), Math.max(0, at.y)));
    this.marks.update((marks) => [...marks, { at: inside, index: suggestIndex(marks, inside) }]);
    this.selected.set(this.marks().length - 1);
  }

  protected renumber(place: number, index: number | null): void {
    if (index === null || !Number.isInteger(index)) return;
    this.marks.update((marks) => marks.map((mark, i) => (i === place ? { ...mark, index } : mark)));
  }

  protected remove(place: number): void {
    this.marks.update((marks) => marks.filter((_, i) => i !== place));
    this.selected.set(null);
    this.canvas().focus();
  }

  protected select(place: number): void {
    this.selected.set(place);
    const mark = this.marks()[place];
    if (mark) this.canvas().reveal(mark.at);
  }

  protected numberLabel({ at }: RulingMark): string {
    return $localize`Number of this graduation, marked at ${at.x.toFixed(1)}:x:, ${at.y.toFixed(1)}:y:`;
  }

  protected removeLabel({ index }: RulingMark): string {
    return $localize`Take mark ${index}:number: away`;
  }

  protected keyDown(event: KeyboardEvent): void {
    if (event.target instanceof HTMLInputElement || event.ctrlKey || event.metaKey || event.altKey) return;
    if (!this.obey(event)) return;
    event.preventDefault();
    event.stopPropagation();
  }

  /** @returns whether the key meant something here */
  private obey({ key, shiftKey }: KeyboardEvent): boolean {
    const arrow = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }[key];
    const place = this.selected();
    if (arrow) {
      const [x = 0, y = 0] = arrow;
      const mark = place === null ? undefined : this.marks()[place];
      const step = shiftKey ? NUDGE.coarse : NUDGE.fine;
      if (mark) this.moveSelected(px(mark.at.x + x * step, mark.at.y + y * step));
      else this.canvas().panBy(-x * 60, -y * 60);
      return true;
    }
    if ((key === 'Delete' || key === 'Backspace') && place !== null) return this.done(() => this.remove(place));
    if (key === 'Escape' && place !== null) return this.done(() => this.selected.set(null));
    if (key === 'm' || key === 'M') return this.done(() => this.addInTheMiddle());
    if (key === '+' || key === '=') return this.done(() => this.canvas().zoomBy(1.5));
    if (key === '-') return this.done(() => this.canvas().zoomBy(1 / 1.5));
    if (key === '0') return this.done(() => this.canvas().fit());
    if (key === '1') return this.done(() => this.canvas().oneToOne());
    if (key === 'Tab') return this.next(shiftKey ? -1 : 1);
    return false;
  }

  private done(action: () => void): true {
    action();
    return true;
  }

  /** Through the marks in the order of their numbers; past the last the focus goes on as everywhere. */
  private next(step: number): boolean {
    if (!this.canvas().hasFocus) return false;
    const rows = this.rows();
    const now = rows.findIndex(({ place }) => place === this.selected());
    const row = now < 0 ? (step > 0 ? rows[0] : undefined) : rows[now + step];
    if (!row) this.selected.set(null);
    else this.select(row.place);
    return row !== undefined;
  }

  private addInTheMiddle(): void {
    const viewport = this.canvas().viewport();
    if (viewport) this.add(viewport.centre);
  }

  private moveSelected(at: ImagePoint): void {
    this.marks.update((marks) => marks.map((mark, place) => (place === this.selected() ? { ...mark, at } : mark)));
  }
}
