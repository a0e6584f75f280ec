import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { GalleryTile } from '@shared/contracts/gallery';
import { lightWords } from '../../core/light-words';
import { LicenceLink } from '../../ui/licence/licence';
import { Picture } from '../../ui/picture/picture';
import { Rule } from '../../ui/rule/rule';
import { TaxonName } from '../../ui/taxon-name/taxon-name';

/** The picture that leads, as a museum hangs what it has just got. */
@Component({
  selector: 'app-hero',
  imports: [MatButtonModule, RouterLink, LicenceLink, Picture, Rule, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <section i18n-aria-label aria-label="New on the wall">
      <a class="picture" [routerLink]="['/finds', tile().findId]" tabindex="-1" aria-hidden="true">
        <app-picture [tile]="tile()" [first]="true" sizes="(max-width: 900px) 100vw, 70vw" />
      </a>
      <div class="label">
        <p class="kind" i18n>New on the wall</p>
        <h2><app-taxon-name [name]="tile().name" /></h2>
        <p class="title">{{ tile().title }}</p>
        <p class="about soft">{{ light() }} · {{ tile().publicPlace }} · {{ tile().findNumber }}</p>
        <app-rule />
        <a mat-flat-button [routerLink]="['/finds', tile().findId]" i18n>Open the find</a>
        <p class="credit soft">
          <ng-container i18n>Picture: {{ tile().creditLine }}</ng-container
          >, <app-licence [licence]="tile().licence" />
        </p>
      </div>
    </section>
  `,
  styleUrl: './hero.scss',
})
export class Hero {
  readonly tile = input.required<GalleryTile>();
  protected readonly light = () => lightWords(this.tile().light);
}
