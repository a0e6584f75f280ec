import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
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
            @if (node.below.length > 0) {
              <button
                type="button"
                [attr.aria-expanded]="isOpen(node)"
                [attr.aria-label]="below + ' ' + node.name.name"
                (click)="turn(node)"
              ></button>
            }
            <a [routerLink]="['/taxa', node.id]"><app-taxon-name [name]="node.name" /></a>
            <span class="soft">{{ rank(node.rank) }}</span>
            @if (node.pictures > 0) {
              <a class="pictures numbers" routerLink="/" [queryParams]="{ taxon: node.id }">{{
                pictureCount(node.pictures)
              }}</a>
            }
          </span>
          @if (node.below.length > 0 && isOpen(node)) {
            <app-taxon-branch [nodes]="node.below" />
          }
        </li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      padding-left: 34px;
    }
    app-taxon-branch {
      display: block;
      margin-left: -17px;
      border-left: 1px solid var(--line);
    }
    .line {
      position: relative;
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0 14px;
      padding: 6px 0;
    }
    button {
      position: absolute;
      left: -39px;
      top: -1px;
      width: 44px;
      height: 44px;
      padding: 0;
      font: 400 1.125rem/1 var(--sans);
      color: var(--ink-soft);
      background: none;
      border: 0;
      cursor: pointer;
    }
    button::before {
      content: '+';
    }
    button[aria-expanded='true']::before {
      content: '−';
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
  protected readonly below = $localize`What is below`;
  private readonly turned = signal<ReadonlySet<string>>(new Set());

  /** Open at first where there is a picture to come to. */
  protected isOpen(node: TaxonNode): boolean {
    return node.pictures > 0 !== this.turned().has(node.id);
  }

  protected turn(node: TaxonNode): void {
    this.turned.update((turned) => {
      const next = new Set(turned);
      if (!next.delete(node.id)) next.add(node.id);
      return next;
    });
  }

  protected readonly rank = rankWords;
  protected readonly pictureCount = pictureCount;
}
