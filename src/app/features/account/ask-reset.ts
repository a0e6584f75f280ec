import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-ask-reset',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Forgotten password</h1>`,
  host: { class: 'page' },
})
export class AskReset {}
