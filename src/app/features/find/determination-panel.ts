import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { findRoutes, type CONFIDENCES, type FindView } from '@shared/contracts/finds';
import { Api } from '../../core/api';
import { dayWords } from '../../core/day-words';
import { focusOnceShown } from '../../core/focus-once-shown';
import { SessionStore } from '../../core/session-store';
import { Submission } from '../../core/submission';
import { ProblemBox } from '../../ui/problem/problem';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import { confidenceWords } from './confidence-words';
import { GiveName } from './give-name';

/** The names that were given, the one that stands first, each with its reason. The history stays. */
@Component({
  selector: 'app-determination-panel',
  imports: [MatButtonModule, RouterLink, GiveName, ProblemBox, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './determination-panel.html',
  styleUrls: ['./panel.scss', './determination-panel.scss'],
})
export class DeterminationPanel {
  private readonly api = inject(Api);
  protected readonly user = inject(SessionStore).user;

  readonly find = input.required<FindView>();
  readonly changed = output<FindView>();

  protected readonly giving = signal(false);
  protected readonly deciding = new Submission();
  private readonly toButton = focusOnceShown('.buttons button');

  protected readonly determinations = computed(() => {
    const newestFirst = this.find().determinations.toSorted((a, b) => b.determinedAt.localeCompare(a.determinedAt));
    return [...newestFirst.filter((each) => each.stands), ...newestFirst.filter((each) => !each.stands)].map(
      (each) => ({
        ...each,
        told: this.toldOf(each.by.name, each.determinedAt, each.confidence),
      }),
    );
  });

  protected letStand(determinationId: string): void {
    const params = { findId: this.find().id, determinationId };
    this.deciding.send(this.api.call(findRoutes.decide, { params }), (find) => this.take(find));
  }

  protected take(find: FindView): void {
    this.close();
    this.changed.emit(find);
  }

  protected close(): void {
    this.giving.set(false);
    this.toButton();
  }

  private toldOf(who: string, when: string, confidence: (typeof CONFIDENCES)[number]): string {
    return `${who}, ${dayWords(when)} · ${confidenceWords(confidence)}`;
  }
}
