import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-not-here',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Nothing here</h1>`,
  host: { class: 'page' },
})
export class NotHere {}
