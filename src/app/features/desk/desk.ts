import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-desk',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>My desk</h1>`,
  host: { class: 'page' },
})
export class Desk {}
