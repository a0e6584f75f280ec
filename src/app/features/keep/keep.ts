import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-keep',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Keeper's desk</h1>`,
  host: { class: 'page' },
})
export class Keep {}
