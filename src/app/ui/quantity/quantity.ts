import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Scale } from '@shared/scale/scale';
import { quantityParts, quantityText } from '@shared/scale/rounding';

/**
 * A length with its uncertainty: "8.44 ± 0.27 µm", or "≈ 8 mm (6–10 mm)" where the scale is estimated.
 * That k is 2 is said to those who point at it and to screen readers; a page says it once in sight.
 */
@Component({
  selector: 'app-quantity',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<span class="numbers" [attr.title]="title()">{{ text() }}</span
    ><span class="unseen">{{ unseen() }}</span>`,
  styles: `
    :host {
      white-space: nowrap;
    }
  `,
})
export class Quantity {
  readonly um = input.required<number>();
  /** combined standard uncertainty (k = 1), µm; it is shown expanded */
  readonly u = input.required<number>();
  readonly grounds = input<Scale['grounds']>('calibrated');

  protected readonly text = computed(() => quantityText(this.um(), this.u(), this.grounds()));
  private readonly parts = computed(() => quantityParts(this.um(), this.u(), this.grounds()));
  protected readonly title = computed(() =>
    this.parts().approx
      ? $localize`Estimated; truly between ${this.parts().low} and ${this.parts().high} ${this.parts().unit} (k = 2)`
      : $localize`± is the expanded uncertainty, k = 2 (about 95 %)`,
  );
  protected readonly unseen = computed(() =>
    this.parts().approx ? $localize`, estimated, k = 2` : $localize`, k = 2`,
  );
}
