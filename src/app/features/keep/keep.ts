import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatTabsModule } from '@angular/material/tabs';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';

/** Where the keeper sees to people, mail, work in the background and the originals. */
@Component({
  selector: 'app-keep',
  imports: [MatTabsModule, RouterLink, RouterLinkActive, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h1 class="page-title" i18n>Keeper's desk</h1>
    <nav mat-tab-nav-bar mat-stretch-tabs="false" [tabPanel]="panel" i18n-aria-label aria-label="Keeper's desk">
      @for (tab of tabs; track tab.path) {
        <a mat-tab-link [routerLink]="tab.path" routerLinkActive #link="routerLinkActive" [active]="link.isActive">
          {{ tab.words }}
        </a>
      }
    </nav>
    <mat-tab-nav-panel #panel>
      <div class="panel"><router-outlet /></div>
    </mat-tab-nav-panel>
  `,
  styles: `
    .panel {
      padding-top: 24px;
    }
  `,
  host: { class: 'page' },
})
export class Keep {
  protected readonly tabs = [
    { path: 'people', words: $localize`People` },
    { path: 'mail', words: $localize`Outgoing mail` },
    { path: 'jobs', words: $localize`Work` },
    { path: 'originals', words: $localize`Originals` },
  ];
}
