import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-bench',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Bench</h1>`,
  host: { class: 'page' },
})
export class Bench {}
