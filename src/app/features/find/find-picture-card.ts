import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { FindPicture } from '@shared/contracts/finds';
import { lightWords } from '../../core/light-words';
import { Picture } from '../../ui/picture/picture';
import { CarryAway } from './carry-away';

/** A picture of a find: opens the bench, and can be carried away. */
@Component({
  selector: 'app-find-picture-card',
  imports: [RouterLink, CarryAway, Picture],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <a [routerLink]="['/images', picture().id]">
      <app-picture [tile]="picture()" sizes="(max-width: 620px) 90vw, (max-width: 1080px) 45vw, 33vw" />
    </a>
    <div class="caption">
      <p>
        {{ about() }}
        <span class="soft">{{ picture().creditLine }}</span>
      </p>
      <app-carry-away [picture]="picture()" [mayEdit]="mayEdit()" />
    </div>
  `,
  styles: `
    a {
      display: block;
    }
    .caption {
      display: flex;
      align-items: flex-start;
      justify-content: space-between;
      gap: 8px;
    }
    p {
      min-width: 0;
      margin: 6px 0 0;
      font-size: 0.9375rem;
      line-height: 1.35;
      overflow-wrap: break-word;
    }
    span {
      display: block;
    }
    @media print {
      app-carry-away {
        display: none;
      }
    }
  `,
})
export class FindPictureCard {
  readonly picture = input.required<FindPicture>();
  readonly mayEdit = input(false);

  protected readonly about = computed(() => {
    const { title, light } = this.picture();
    return [title, lightWords(light)].filter(Boolean).join(', ');
  });
}
