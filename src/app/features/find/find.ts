import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DOCUMENT,
  effect,
  inject,
  Injector,
  input,
  RESPONSE_INIT,
  signal,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { findRoutes, type FindView } from '@shared/contracts/finds';
import type { ImageView } from '@shared/contracts/images';
import { Api } from '../../core/api';
import { toApiProblem } from '../../core/api-problem';
import { focusOnceShown } from '../../core/focus-once-shown';
import { nameWords } from '../../core/name-words';
import { PageMeta } from '../../core/page-meta';
import { Empty } from '../../ui/empty/empty';
import { renditionUrl } from '../../ui/picture/picture';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { AddObservation } from './add-observation';
import { DeterminationPanel } from './determination-panel';
import { Observation } from './observation';
import { pictureNames, withPicture } from './pictures-of-find';
import { PlacePanel } from './place-panel';
import { SeriesPanel } from './series-panel';
import { VisibilityPanel } from './visibility-panel';

/** One find: its observations along a ruled line, and beside them what is known of it. */
@Component({
  selector: 'app-find',
  imports: [
    MatButtonModule,
    RouterLink,
    AddObservation,
    DeterminationPanel,
    Empty,
    Observation,
    PlacePanel,
    ProblemBox,
    Rule,
    SeriesPanel,
    TaxonName,
    VisibilityPanel,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './find.html',
  styleUrl: './find.scss',
})
export class Find {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);

  /** from the address */
  readonly findId = input.required<string>();

  protected readonly answer = inject(Api).resource(findRoutes.read, () => ({ params: { findId: this.findId() } }));
  protected readonly find = computed(() => (this.answer.hasValue() ? this.answer.value() : null));
  protected readonly missing = computed(() => toApiProblem(this.answer.error()).code === 'not-found');
  protected readonly adding = signal(false);
  private readonly toButton = focusOnceShown('.add button');
  protected readonly names = computed(() => {
    const find = this.find();
    return find ? pictureNames(find) : new Map<string, string>();
  });

  protected readonly subtitle = computed(() => {
    const find = this.find();
    if (!find) return '';
    const substrate = find.observations.find((observation) => observation.substrate)?.substrate;
    const words = [find.number, $localize`found by ${find.owner.name}`, find.publicPlace.words, substrate];
    return words.filter(Boolean).join(' · ');
  });

  constructor() {
    const meta = inject(PageMeta);
    const response = inject(RESPONSE_INIT, { optional: true });
    effect(() => {
      const find = this.find();
      if (find) meta.describe({ title: this.titleOf(find), description: this.subtitle(), image: coverOf(find) });
      if (!this.answer.error()) return;
      if (response) response.status = this.missing() ? 404 : 503;
      meta.describe({ title: $localize`Find`, description: '', image: null });
    });
  }

  /** Every change answers with the whole find, so that nothing has to be fetched again. */
  protected take(find: FindView): void {
    this.answer.set(find);
  }

  protected close(): void {
    this.adding.set(false);
    this.toButton();
  }

  /** Describing a picture answers with the picture alone. */
  protected takePicture(image: ImageView): void {
    const find = this.find();
    if (!find) return;
    this.answer.set(withPicture(find, image));
    // It may have moved to another preparation: the keyboard goes on where the picture is now.
    afterNextRender(() => this.document.getElementById(`details-${image.id}`)?.focus(), { injector: this.injector });
  }

  private titleOf(find: FindView): string {
    const name = find.standing ? nameWords(find.standing.name) : $localize`Not yet named`;
    return `${name}, ${find.number}`;
  }
}

function coverOf(find: FindView): string | null {
  const cover = find.observations.flatMap((o) => o.pictures).find((picture) => picture.role === 'subject');
  return cover ? renditionUrl(cover, Math.max(...cover.renditionWidths, 0)) : null;
}
