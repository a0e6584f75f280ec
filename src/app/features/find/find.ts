import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-find',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Find</h1>`,
  host: { class: 'page' },
})
export class Find {}
