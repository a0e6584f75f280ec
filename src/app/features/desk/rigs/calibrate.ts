import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-calibrate',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Calibrate</h1>`,
  host: { class: 'page' },
})
export class Calibrate {}
