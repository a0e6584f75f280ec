import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-tray',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Sorting tray</h1>`,
  host: { class: 'page' },
})
export class Tray {}
