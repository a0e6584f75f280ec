import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Rule } from '../../ui/rule/rule';

@Component({
  selector: 'app-footer',
  imports: [RouterLink, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <footer>
      <app-rule />
      <p i18n>Identification here never says that something is safe to eat.</p>
      <p><a routerLink="/about" i18n>About Motebook and its scale bars</a></p>
    </footer>
  `,
  styles: `
    footer {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 28px;
      padding: 0 var(--gutter) 28px;
      color: var(--ink-soft);
      font-size: 0.9375rem;
    }
    app-rule {
      flex: 1 0 100%;
      margin-bottom: 10px;
    }
    p {
      margin: 0;
    }
    a {
      color: inherit;
    }
    @media print {
      p + p {
        display: none;
      }
    }
  `,
})
export class Footer {}
