import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-invitation',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Invitation</h1>`,
  host: { class: 'page' },
})
export class Invitation {}
