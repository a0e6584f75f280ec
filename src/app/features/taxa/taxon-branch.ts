import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { pictureCount } from '../../core/count-words';
import { rankWords } from '../../core/rank-words';
import { TaxonName } from '../../ui/taxon-name/taxon-name';
import type { TaxonNode } from './taxon-tree';

/** One level of the tree, and by itself all levels below it. */
@Component({
  selector: 'app-taxon-branch',
  imports: [RouterLink, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ul>
      @for (node of nodes(); track node.id) {
        <li>
          <span class="line">
            <a [routerLink]="['/taxa', node.id]"><app-taxon-name [name]="node.name" /></a>
            <span class="soft">{{ rank(node.rank) }}</span>
            @if (node.pictures > 0) {
              <a class="pictures numbers" routerLink="/" [queryParams]="{ taxon: node.id }">{{
                pictureCount(node.pictures)
              }}</a>
            }
          </span>
          @if (node.below.length > 0) {
            <app-taxon-branch [nodes]="node.below" />
          }
        </li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0;
      padding: 0 0 0 22px;
      list-style: none;
      border-left: 1px solid var(--line);
    }
    li {
      position: relative;
    }
    li::before {
      content: '';
      position: absolute;
      left: -22px;
      top: 22px;
      width: 12px;
      height: 1px;
      background: var(--line-strong);
    }
    .line {
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0 14px;
      padding: 8px 0;
    }
    .line a {
      padding: 3px 0;
      color: var(--ink);
      text-decoration: none;
    }
    .line a:hover {
      text-decoration: underline;
    }
    .line .pictures {
      color: var(--rust);
    }
    .soft {
      font-size: 0.9375rem;
    }
  `,
})
export class TaxonBranch {
  readonly nodes = input.required<readonly TaxonNode[]>();
  protected readonly rank = rankWords;
  protected readonly pictureCount = pictureCount;
}
