import { ChangeDetectionStrategy, Component, computed, inject, Injector, input, output, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { FindPicture, PreparationView } from '@shared/contracts/finds';
import type { ImageView } from '@shared/contracts/images';
import { lightWords } from '../../core/light-words';
import { LicenceLink } from '../../ui/licence/licence';
import { Picture } from '../../ui/picture/picture';
import { CarryAway } from './carry-away';

/** A picture of a find: opens the bench, can be carried away, and is described by whom it belongs to. */
@Component({
  selector: 'app-find-picture-card',
  imports: [MatButtonModule, RouterLink, CarryAway, LicenceLink, Picture],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <a class="picture" [routerLink]="['/images', picture().id]">
      <app-picture
        [tile]="picture()"
        [otherwise]="name()"
        sizes="(max-width: 620px) 90vw, (max-width: 1080px) 45vw, 33vw"
      />
    </a>
    <div class="caption">
      <div class="words">
        <p>
          {{ about() }}
          <span class="soft">{{ picture().creditLine }}, <app-licence [licence]="picture().licence" /></span>
        </p>
        @if (mayEdit()) {
          <button
            [id]="'details-' + picture().id"
            type="button"
            mat-button
            (click)="openDetails()"
            [attr.aria-label]="detailsLabel()"
            i18n
          >
            Details
          </button>
          @if (failed()) {
            <p class="wrong" role="alert" i18n>The form could not be fetched. Check the connection and try again.</p>
          }
        }
      </div>
      <app-carry-away [picture]="picture()" [name]="name()" [mayEdit]="mayEdit()" />
    </div>
  `,
  styles: `
    .picture {
      display: block;
    }
    .caption {
      display: flex;
      align-items: flex-start;
      justify-content: space-between;
      gap: 8px;
    }
    .words {
      min-width: 0;
    }
    p {
      margin: 6px 0 0;
      font-size: 0.9375rem;
      line-height: 1.35;
      overflow-wrap: break-word;
    }
    span {
      display: block;
    }
    button {
      margin: 2px 0 0 -12px;
    }
    .wrong {
      color: var(--warn);
    }
    @media print {
      app-carry-away,
      button {
        display: none;
      }
    }
  `,
})
export class FindPictureCard {
  private readonly injector = inject(Injector);

  readonly picture = input.required<FindPicture>();
  /** what the picture is called, where its own words are missing too */
  readonly name = input.required<string>();
  /** of its observation */
  readonly preparations = input.required<readonly PreparationView[]>();
  readonly mayEdit = input(false);
  readonly described = output<ImageView>();

  protected readonly failed = signal(false);
  protected readonly detailsLabel = computed(() => $localize`Details of ${this.name()}:picture:`);
  protected readonly about = computed(() => {
    const { title, light } = this.picture();
    return [title, lightWords(light)].filter(Boolean).join(', ');
  });

  /** The form is fetched only now: those who look at finds seldom need it. */
  protected async openDetails(): Promise<void> {
    this.failed.set(false);
    try {
      const { openPictureDetails } = await import('./picture-details');
      openPictureDetails(this.injector, { picture: this.picture(), preparations: this.preparations() }).subscribe(
        (image) => this.described.emit(image),
      );
    } catch {
      this.failed.set(true); // the connection is gone, or a newer Motebook has taken the file's place
    }
  }
}
