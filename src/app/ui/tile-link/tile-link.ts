import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { GalleryTile } from '@shared/contracts/gallery';
import { lightWords } from '../../core/light-words';
import { nameWords } from '../../core/name-words';
import { Picture } from '../picture/picture';
import { TaxonName } from '../taxon-name/taxon-name';

/** A picture on a wall with its label, leading to its find. */
@Component({
  selector: 'app-tile-link',
  imports: [RouterLink, Picture, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <a [routerLink]="['/finds', tile().findId]">
      <app-picture
        [tile]="tile()"
        [first]="first()"
        [otherwise]="otherwise()"
        sizes="(max-width: 620px) 100vw, (max-width: 980px) 50vw, (max-width: 1500px) 33vw, 25vw"
      />
      <span class="name"><app-taxon-name [name]="tile().name" /></span>
      <span class="about">{{ about() }}</span>
    </a>
  `,
  styles: `
    a {
      display: block;
      color: var(--ink);
      text-decoration: none;
    }
    .name,
    .about {
      display: block;
      overflow: hidden;
      text-overflow: ellipsis;
      white-space: nowrap;
    }
    .name {
      margin-top: 10px;
    }
    .about {
      color: var(--ink-soft);
      font-size: 0.9375rem;
    }
    a:hover .name {
      text-decoration: underline;
      text-underline-offset: 0.2em;
      text-decoration-thickness: 1px;
    }
  `,
})
export class TileLink {
  readonly tile = input.required<GalleryTile>();
  readonly first = input(false);

  protected readonly otherwise = computed(() => {
    const { title, name, findNumber } = this.tile();
    return title || $localize`${name ? nameWords(name) : $localize`Not yet named`}:name:, ${findNumber}:number:`;
  });
  protected readonly about = computed(() => {
    const { light, publicPlace, findNumber } = this.tile();
    return [lightWords(light), publicPlace, findNumber].filter(Boolean).join(' · ');
  });
}
