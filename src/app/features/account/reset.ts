import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-reset',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>New password</h1>`,
  host: { class: 'page' },
})
export class Reset {}
