import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { NameView } from '@shared/contracts/common';
import { nameParts } from '@shared/taxonomy/name';

/** A scientific name set as its code of nomenclature has it; `null` is a find that nobody has named yet. */
@Component({
  selector: 'app-taxon-name',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `@for (part of parts(); track $index) {
      @if (part.italic) {
        <i>{{ part.text }}</i>
      } @else {
        <span>{{ part.text }}</span>
      }
    } @empty {
      <span i18n>Not yet named</span>
    }`,
  styles: `
    :host {
      font-family: var(--serif);
    }
    span {
      white-space-collapse: preserve; /* the pieces carry their spaces; whether lines break is for the place to say */
    }
  `,
})
export class TaxonName {
  readonly name = input.required<NameView | null>();
  readonly authorship = input(false);

  protected readonly parts = computed(() => {
    const name = this.name();
    return name ? nameParts({ ...name, authorship: this.authorship() ? name.authorship : null }) : [];
  });
}
