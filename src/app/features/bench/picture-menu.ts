import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatMenuModule } from '@angular/material/menu';
import { mdiDownload } from '@mdi/js';
import { imageRoutes, PICTURE_FORMATS, type ImageView } from '@shared/contracts/images';
import { pathOf } from '../../core/api';
import { Icon } from '../../ui/icon/icon';

/** Widths that people ask for: a screen, a page of print; the original's own stands first. */
const WIDTHS = [3000, 1600] as const;
const WIDEST = 8000;

/** *Picture with bar*: a copy to carry away, its bar drawn in by its grounds. */
@Component({
  selector: 'app-picture-menu',
  imports: [MatMenuModule, Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button type="button" [matMenuTriggerFor]="menu" i18n-aria-label aria-label="Picture with bar">
      <app-icon [path]="icon" /><span class="words" i18n>Picture with bar</span>
    </button>
    <mat-menu #menu="matMenu">
      @for (choice of choices(); track choice.href) {
        <a mat-menu-item [href]="choice.href" download>{{ choice.words }}</a>
      }
    </mat-menu>
  `,
  styles: `
    button {
      display: flex;
      align-items: center;
      gap: 6px;
      min-height: 40px;
      padding: 0 8px;
      border: 0;
      background: none;
      color: var(--ink);
      font: inherit;
      font-size: 0.9375rem;
      white-space: nowrap;
      cursor: pointer;
    }
    button:hover {
      background: var(--label);
    }
    app-icon {
      width: 20px;
      height: 20px;
    }
    @media (max-width: 859px) {
      .words {
        display: none;
      }
      button {
        min-width: 44px;
        min-height: 44px;
        justify-content: center;
      }
    }
  `,
})
export class PictureMenu {
  readonly image = input.required<ImageView>();

  protected readonly icon = mdiDownload;
  protected readonly choices = computed(() => {
    const { id, width } = this.image();
    const path = pathOf(imageRoutes.picture, { params: { imageId: id } });
    const widths = [Math.min(width, WIDEST), ...WIDTHS.filter((one) => one < width)];
    const withBar = widths.flatMap((one) =>
      PICTURE_FORMATS.map((format) => ({
        href: `${path}?width=${one}&format=${format}`,
        words: $localize`${one}:width: pixels wide, ${format === 'jpeg' ? 'JPEG' : 'PNG'}:format:`,
      })),
    );
    return [...withBar, { href: `${path}?width=${widths[0]}&format=png&bar=off`, words: $localize`Without bar, PNG` }];
  });
}
