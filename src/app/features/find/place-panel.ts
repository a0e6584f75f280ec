import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { FindView } from '@shared/contracts/finds';
import { SessionStore } from '../../core/session-store';
import { aroundWords } from './place-words';

/** Where: what everybody is shown, and the exact place for the few who may see it, marked as such. */
@Component({
  selector: 'app-place-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './place-panel.html',
  styleUrl: './panel.scss',
})
export class PlacePanel {
  private readonly user = inject(SessionStore).user;
  readonly find = input.required<FindView>();

  protected readonly publicPlace = computed(() => {
    const place = this.find().publicPlace;
    return { words: place.words, around: aroundWords(place) };
  });
  protected readonly exact = computed(() => {
    const place = this.find().exactPlace;
    return place && { words: place.words, around: aroundWords(place) };
  });
  protected readonly isFinder = computed(() => this.user()?.id === this.find().owner.id);
  protected readonly readers = computed(() =>
    this.find()
      .placeReaders.map((person) => person.name)
      .join(', '),
  );
}
