import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-taxon',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Taxon</h1>`,
  host: { class: 'page' },
})
export class Taxon {}
