import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** One path of @mdi/js, beside words or inside a button that has a name of its own. */
@Component({
  selector: 'app-icon',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<svg viewBox="0 0 24 24" aria-hidden="true"><path [attr.d]="path()" fill="currentColor" /></svg>`,
  styles: `
    :host {
      display: inline-block;
      flex: none;
      width: 24px;
      height: 24px;
      vertical-align: middle;
    }
  `,
})
export class Icon {
  readonly path = input.required<string>();
}
