import { ChangeDetectionStrategy, Component } from '@angular/core';

/** Three rows of empty mounts while the first page is on its way. */
@Component({
  selector: 'app-wall-skeleton',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="unseen" role="status" i18n>Pictures are being fetched</p>
    <div aria-hidden="true">
      @for (aspect of aspects; track $index) {
        <span [style.flex-grow]="aspect" [style.flex-basis.px]="aspect * 220" [style.aspect-ratio]="aspect"></span>
      }
    </div>
  `,
  styles: `
    div {
      display: flex;
      flex-wrap: wrap;
      gap: 60px 20px;
    }
    span {
      background: var(--line);
      animation: breathe 1.6s ease-in-out infinite alternate;
    }
    @keyframes breathe {
      from {
        opacity: 0.5;
      }
    }
  `,
})
export class WallSkeleton {
  protected readonly aspects = [1.5, 1.33, 1.5, 1.33, 1.5, 1.5, 1.5, 1.33, 1.33];
}
