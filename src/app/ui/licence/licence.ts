import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { licenceUri, type Licence } from '@shared/contracts/common';
import { licenceWords } from '../../core/licence-words';

/** The licence that stands beside a picture's credit, as a link to its deed; machines read it by its `rel`. */
@Component({
  selector: 'app-licence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `@if (uri(); as uri) {
      <a [href]="uri" rel="license noopener" target="_blank">{{ words() }}</a>
    } @else {
      {{ words() }}
    }`,
  styles: `
    :host {
      white-space: nowrap;
    }
    a {
      color: inherit;
    }
  `,
})
export class LicenceLink {
  readonly licence = input.required<Licence>();

  protected readonly uri = computed(() => licenceUri(this.licence()));
  protected readonly words = computed(() => licenceWords(this.licence()));
}
