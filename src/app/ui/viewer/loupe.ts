import { ChangeDetectionStrategy, Component, computed, effect, type ElementRef, input, viewChild } from '@angular/core';
import type { ViewPoint } from '@shared/geometry/points';

/** CSS px of its side, and how much it magnifies what is on the screen. */
const SIDE = 132;
const MAGNIFIES = 4;

/**
 * What lies under the pointer, larger, in a corner where neither finger nor hand is: a finger hides
 * the very edge that it is put on.
 */
@Component({
  selector: 'app-loupe',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<canvas #glass [width]="side * 2" [height]="side * 2" aria-hidden="true"></canvas>`,
  styles: `
    :host {
      position: absolute;
      top: 10px;
      left: 10px;
      border: 1px solid #ede6d8;
      box-shadow: 0 0 0 1px #15130f;
      pointer-events: none;
    }
    :host(.right) {
      left: auto;
      right: 56px;
    }
    canvas {
      display: block;
      width: 132px;
      height: 132px;
    }
  `,
  host: { '[class.right]': 'right()', '[hidden]': 'at() === null' },
})
export class Loupe {
  readonly at = input.required<ViewPoint | null>();
  /** what is on the screen: device pixels of a canvas that is `viewWidth` CSS px wide */
  readonly pixels = input.required<HTMLCanvasElement | null>();
  readonly viewWidth = input.required<number>();

  protected readonly side = SIDE;
  private readonly glass = viewChild.required<ElementRef<HTMLCanvasElement>>('glass');
  /** away from the pointer */
  protected readonly right = computed(() => {
    const at = this.at();
    return at !== null && at.x < SIDE * 1.8 && at.y < SIDE * 1.8;
  });

  constructor() {
    effect(() => {
      const at = this.at();
      const source = this.pixels();
      const viewWidth = this.viewWidth();
      const glass = this.glass().nativeElement;
      const context = glass.getContext('2d');
      if (!at || !source || !context || viewWidth === 0) return;
      const density = source.width / viewWidth;
      const part = (SIDE / MAGNIFIES) * density;
      context.imageSmoothingEnabled = false;
      context.fillStyle = '#15130f';
      context.fillRect(0, 0, glass.width, glass.height);
      context.drawImage(
        source,
        at.x * density - part / 2,
        at.y * density - part / 2,
        part,
        part,
        0,
        0,
        glass.width,
        glass.height,
      );
      this.crosshair(context);
    });
  }

  /** Open in the middle, so that the point itself stays in sight; light over dark, to stand on anything. */
  private crosshair(context: CanvasRenderingContext2D): void {
    const [middle, gap, whole] = [SIDE, 10, SIDE * 2];
    for (const [colour, width] of [
      ['#15130f', 5],
      ['#ffb88a', 2],
    ] as const) {
      context.strokeStyle = colour;
      context.lineWidth = width;
      context.beginPath();
      for (const [from, to] of [
        [0, middle - gap],
        [middle + gap, whole],
      ] as const) {
        context.moveTo(from, middle);
        context.lineTo(to, middle);
        context.moveTo(middle, from);
        context.lineTo(middle, to);
      }
      context.stroke();
    }
  }
}
