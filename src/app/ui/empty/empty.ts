import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Rule } from '../rule/rule';

/** Where there is nothing yet: says what would stand here, and holds what to do about it. */
@Component({
  selector: 'app-empty',
  imports: [Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <app-rule />
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      max-width: 34rem;
      padding: 24px 0;
      color: var(--ink-soft);
    }
    app-rule {
      width: 120px;
      margin-bottom: 16px;
    }
  `,
})
export class Empty {}
