import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatMenuModule } from '@angular/material/menu';
import { mdiTrayArrowDown } from '@mdi/js';
import { licenceUri } from '@shared/contracts/common';
import type { FindPicture } from '@shared/contracts/finds';
import { imageRoutes, PICTURE_FORMATS, type ImageView } from '@shared/contracts/images';
import { Api, pathOf } from '../../core/api';
import { licenceWords } from '../../core/licence-words';
import { Icon } from '../../ui/icon/icon';

const WIDTHS = [800, 1600] as const;

/** A copy of the picture with its bar in it, and the terms on which it may be used, which stand where one takes it. */
@Component({
  selector: 'app-carry-away',
  imports: [MatButtonModule, MatMenuModule, Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './carry-away.html',
  styleUrl: './carry-away.scss',
})
export class CarryAway {
  private readonly api = inject(Api);
  protected readonly icon = mdiTrayArrowDown;

  readonly picture = input.required<FindPicture>();
  readonly mayEdit = input(false);

  protected readonly label = computed(() => {
    const { title, altText } = this.picture();
    return $localize`Carry away a copy of ${title || altText}:picture:`;
  });
  protected readonly barred = computed(() => (this.picture().scale?.grounds ?? 'none') !== 'none');
  protected readonly original = computed(() => pathOf(imageRoutes.original, this.at()));
  protected readonly copies = computed(() => {
    const { width } = this.picture();
    return PICTURE_FORMATS.flatMap((format) => [
      ...WIDTHS.filter((each) => each < width).map((each) => this.copy(format, each)),
      this.copy(format, null),
    ]);
  });

  private readonly image = signal<ImageView | null>(null);
  protected readonly terms = computed(() => {
    const image = this.image();
    return image && { credit: image.creditLine, words: licenceWords(image.licence), uri: licenceUri(image.licence) };
  });

  protected fetchTerms(): void {
    if (this.image()) return;
    this.api.call(imageRoutes.read, this.at()).subscribe({
      next: (image) => this.image.set(image),
      error: () => undefined, // the credit stands beside the picture; without its licence nothing may be assumed
    });
  }

  private copy(format: (typeof PICTURE_FORMATS)[number], width: number | null) {
    const query = new URLSearchParams({
      format,
      bar: this.barred() ? 'on' : 'off',
      ...(width ? { width: String(width) } : {}),
    });
    const kind = format === 'jpeg' ? 'JPEG' : 'PNG';
    return {
      url: `${pathOf(imageRoutes.picture, this.at())}?${query.toString()}`,
      words: width ? $localize`${kind}, ${width} px wide` : $localize`${kind}, full size`,
    };
  }

  private at() {
    return { params: { imageId: this.picture().id } };
  }
}
