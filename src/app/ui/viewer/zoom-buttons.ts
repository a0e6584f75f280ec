import { ChangeDetectionStrategy, Component, output } from '@angular/core';
import { mdiFitToPageOutline, mdiMinus, mdiPlus } from '@mdi/js';
import { Icon } from '../icon/icon';

/** In, out, the whole picture, and one image pixel per pixel of the screen (CSS). */
@Component({
  selector: 'app-zoom-buttons',
  imports: [Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button type="button" (click)="zoom.emit(1.5)" i18n-aria-label aria-label="Nearer" i18n-title title="Nearer (+)">
      <app-icon [path]="icons.plus" />
    </button>
    <button
      type="button"
      (click)="zoom.emit(1 / 1.5)"
      i18n-aria-label
      aria-label="Farther"
      i18n-title
      title="Farther (−)"
    >
      <app-icon [path]="icons.minus" />
    </button>
    <button
      type="button"
      (click)="fit.emit()"
      i18n-aria-label
      aria-label="The whole picture"
      i18n-title
      title="The whole picture (0)"
    >
      <app-icon [path]="icons.fit" />
    </button>
    <button
      type="button"
      class="text"
      (click)="oneToOne.emit()"
      i18n-aria-label
      aria-label="Pixel for pixel, 1:1"
      i18n-title
      title="Pixel for pixel (1)"
    >
      1:1
    </button>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 1px;
      background: var(--line);
      border: 1px solid var(--line);
    }
    button {
      display: grid;
      place-items: center;
      width: 34px;
      height: 34px;
      padding: 0;
      color: #ede6d8;
      background: rgb(21 19 15 / 82%);
      border: 0;
      cursor: pointer;
    }
    button:hover {
      background: #37322a;
    }
    app-icon {
      width: 20px;
      height: 20px;
    }
    .text {
      font: 600 0.8125rem var(--sans);
    }
    @media (pointer: coarse) {
      button {
        width: 44px;
        height: 44px;
      }
    }
  `,
})
export class ZoomButtons {
  /** the factor */
  readonly zoom = output<number>();
  readonly fit = output<void>();
  readonly oneToOne = output<void>();
  protected readonly icons = { plus: mdiPlus, minus: mdiMinus, fit: mdiFitToPageOutline };
}
