import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'app-profile',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 class="page-title" i18n>Profile</h1>`,
  host: { class: 'page' },
})
export class Profile {}
