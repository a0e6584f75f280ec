import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-rigs',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Rigs</h1>`,
  host: { class: 'page' },
})
export class Rigs {}
