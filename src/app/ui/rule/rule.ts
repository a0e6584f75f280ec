import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/**
 * The graduated rule, the one ornament: under titles, as the timeline (`upright`), and as progress
 * (`progress` from 0 to 1, with a `label` saying of what). Graduations are a background, so that it
 * is as long as its place.
 */
@Component({
  selector: 'app-rule',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (percent() !== null) {
      <span class="filled" [style.width.%]="percent()"></span>
    }
  `,
  styleUrl: './rule.scss',
  host: {
    '[class.upright]': 'upright()',
    '[class.progress]': 'percent() !== null',
    '[attr.role]': 'percent() === null ? null : "progressbar"',
    '[attr.aria-hidden]': 'percent() === null ? true : null',
    '[attr.aria-label]': 'percent() === null ? null : label()',
    '[attr.aria-valuemin]': 'percent() === null ? null : 0',
    '[attr.aria-valuemax]': 'percent() === null ? null : 100',
    '[attr.aria-valuenow]': 'percent()',
  },
})
export class Rule {
  readonly upright = input(false);
  readonly progress = input<number | null>(null);
  readonly label = input($localize`Progress`);

  protected readonly percent = computed(() => {
    const progress = this.progress();
    return progress === null || !Number.isFinite(progress)
      ? null
      : Math.round(Math.min(1, Math.max(0, progress)) * 100);
  });
}
