import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatMenuModule } from '@angular/material/menu';
import { mdiTrayArrowDown } from '@mdi/js';
import { licenceUri } from '@shared/contracts/common';
import type { FindPicture } from '@shared/contracts/finds';
import { imageRoutes, PICTURE_FORMATS } from '@shared/contracts/images';
import { pathOf } from '../../core/api';
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
  protected readonly icon = mdiTrayArrowDown;

  readonly picture = input.required<FindPicture>();
  /** what the picture is called */
  readonly name = input.required<string>();
  readonly mayEdit = input(false);

  protected readonly label = computed(() => $localize`Carry away a copy of ${this.name()}:picture:`);
  protected readonly barred = computed(() => (this.picture().scale?.grounds ?? 'none') !== 'none');
  protected readonly original = computed(() => pathOf(imageRoutes.original, this.at()));
  protected readonly copies = computed(() => {
    const { width } = this.picture();
    return PICTURE_FORMATS.flatMap((format) => [
      ...WIDTHS.filter((each) => each < width).map((each) => this.copy(format, each)),
      this.copy(format, null),
    ]);
  });

  protected readonly terms = computed(() => {
    const { creditLine, licence } = this.picture();
    return { credit: creditLine, words: licenceWords(licence), uri: licenceUri(licence) };
  });

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
