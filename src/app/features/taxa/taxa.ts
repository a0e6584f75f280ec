import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-taxa',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Taxa</h1>`,
  host: { class: 'page' },
})
export class Taxa {}
