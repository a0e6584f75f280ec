import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ImageTile } from '@shared/contracts/images';
import { barLayout } from '@shared/scale/scale-bar';

/**
 * The bar over a picture, true at every width that the picture is shown at: it takes its length as a
 * share of the picture, so that nothing has to be measured on the page. It fills its parent, which
 * must be exactly the picture.
 *
 * Its look tells the grounds: solid with end ticks, open, dashed with ≈, or the words "no scale".
 */
@Component({
  selector: 'app-scale-bar',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './scale-bar.html',
  styleUrl: './scale-bar.scss',
})
export class ScaleBar {
  readonly scale = input.required<ImageTile['scale']>();
  /** upright pixels of the whole picture */
  readonly imageWidth = input.required<number>();

  protected readonly bar = computed(() => {
    const scale = this.scale();
    const imageWidthPx = this.imageWidth();
    return barLayout({ imageWidthPx, umPerPx: scale?.umPerPxX ?? null, grounds: scale?.grounds ?? 'none' });
  });
  protected readonly percent = computed(() => (100 * (this.bar()?.lengthPx ?? 0)) / this.imageWidth());
  protected readonly grounds = computed(() => this.scale()?.grounds ?? 'none');
  protected readonly words = computed(() => {
    const label = this.bar()?.label ?? '';
    switch (this.grounds()) {
      case 'calibrated':
        return $localize`Scale bar ${label}, calibrated`;
      case 'referenced':
        return $localize`Scale bar ${label}, from a reference in the picture`;
      case 'estimated':
        return $localize`Scale bar ${label}, estimated`;
      case 'none':
        return $localize`No scale`;
    }
  });
}
