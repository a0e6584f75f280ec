import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import type { FindPicture, FindView, ObservationView } from '@shared/contracts/finds';
import type { ImageView } from '@shared/contracts/images';
import { dayWords } from '../../core/day-words';
import { focusOnceShown } from '../../core/focus-once-shown';
import { Each, Justified, type RowAspects } from '../../ui/justified/justified';
import { AddPreparation } from './add-preparation';
import { FindPictureCard } from './find-picture-card';
import { conditionWords, kindWords } from './observation-words';

interface PictureGroup {
  readonly id: string;
  /** '' for pictures that need none */
  readonly title: string;
  readonly about: string;
  readonly pictures: readonly FindPicture[];
}

const hasPictures = ({ pictures }: PictureGroup): boolean => pictures.length > 0;

/** One dated look at the find: its date and kind stand as its title, its pictures by preparation. */
@Component({
  selector: 'app-observation',
  imports: [MatButtonModule, AddPreparation, Each, FindPictureCard, Justified],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './observation.html',
  styleUrl: './observation.scss',
})
export class Observation {
  readonly observation = input.required<ObservationView>();
  readonly findId = input.required<string>();
  readonly finderId = input.required<string>();
  /** what its pictures are called, by their ids */
  readonly names = input.required<ReadonlyMap<string, string>>();
  readonly mayEdit = input(false);
  readonly changed = output<FindView>();
  /** one of its pictures was described anew */
  readonly described = output<ImageView>();

  protected readonly adding = signal(false);
  private readonly toButton = focusOnceShown('.add');
  /** In narrower rooms than the gallery's; a picture that is alone is shown larger. */
  protected rowsFor(pictures: readonly FindPicture[]): RowAspects {
    return pictures.length === 1 ? { s: 1.5, m: 2, l: 2.3, xl: 3 } : { s: 1.5, m: 2.8, l: 3.2, xl: 4.4 };
  }

  protected readonly day = computed(() => dayWords(this.observation().observedOn));
  protected readonly kind = computed(() => kindWords(this.observation().kind));
  /** said only where somebody else than the finder looked */
  protected readonly observer = computed(() => {
    const { observer } = this.observation();
    return observer.id === this.finderId() ? null : observer.name;
  });
  /** Its pictures: those of no preparation, those of each, and last what their scale comes from. */
  protected readonly groups = computed<readonly PictureGroup[]>(() => {
    const { pictures, preparations } = this.observation();
    const subjects = pictures.filter(({ role }) => role === 'subject');
    const of = (id: string | null) => subjects.filter(({ preparationId }) => preparationId === id);
    const loose: PictureGroup = { id: 'loose', title: '', about: '', pictures: of(null) };
    const references: PictureGroup = {
      id: 'references',
      title: $localize`Scale references`,
      about: $localize`Not pictures of the find: the scale of others comes from them.`,
      pictures: pictures.filter(({ role }) => role === 'reference'),
    };
    return [
      ...[loose].filter(hasPictures),
      ...preparations.map(({ id, title, part, medium, stain, condition }) => ({
        ...{ id, title, pictures: of(id) },
        about: [part, medium, stain, conditionWords(condition)].filter(Boolean).join(', '),
      })),
      ...[references].filter(hasPictures),
    ];
  });

  protected take(find: FindView): void {
    this.close();
    this.changed.emit(find);
  }

  protected close(): void {
    this.adding.set(false);
    this.toButton();
  }
}
