import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Empty } from '../../ui/empty/empty';

/** For addresses that lead nowhere, or nowhere for this person. */
@Component({
  selector: 'app-not-here',
  imports: [MatButtonModule, RouterLink, Empty],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="page">
      <h1 i18n>Nothing under this stone</h1>
      <app-empty>
        <p i18n>There is no page at this address, or it is not shown to you.</p>
        <a mat-stroked-button routerLink="/" i18n>To the gallery</a>
      </app-empty>
    </div>
  `,
})
export class NotHere {}
