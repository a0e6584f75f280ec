import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { toApiProblem } from '../../core/api-problem';
import { problemWords } from '../../core/problem-words';

/** What went wrong, said where it went wrong, with a way on. */
@Component({
  selector: 'app-problem',
  imports: [MatButtonModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p>{{ words() }}</p>
    @if (retry()) {
      <button type="button" mat-stroked-button (click)="again.emit()" i18n>Try again</button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 8px 20px;
      padding: 12px 16px;
      background: var(--label);
      border: 1px solid var(--line);
      border-left: 3px solid var(--warn);
    }
    p {
      margin: 0;
      flex: 1 1 16em;
    }
  `,
  host: { role: 'alert' },
})
export class ProblemBox {
  /** an ApiProblem, or whatever a resource failed with */
  readonly problem = input.required<unknown>();
  /** whether trying again makes sense here */
  readonly retry = input(false);
  readonly again = output<void>();

  protected readonly words = computed(() => problemWords(toApiProblem(this.problem())));
}
