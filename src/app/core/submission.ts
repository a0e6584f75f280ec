import { signal } from '@angular/core';
import type { Observable } from 'rxjs';
import { toApiProblem, type ApiProblem } from './api-problem';
import { fieldWords, problemWords } from './problem-words';

/** One form on its way to the server: whether it is, and what the server had against it. */
export class Submission {
  private readonly underWay = signal(false);
  private readonly met = signal<ApiProblem | null>(null);

  readonly busy = this.underWay.asReadonly();
  readonly problem = this.met.asReadonly();

  /** A second press while the first is on its way is not sent. */
  send<T>(request: Observable<T>, done: (answer: T) => void): void {
    if (this.underWay()) return;
    this.underWay.set(true);
    this.met.set(null);
    request.subscribe({
      next: (answer) => {
        this.underWay.set(false);
        done(answer);
      },
      error: (error: unknown) => {
        this.underWay.set(false);
        this.met.set(toApiProblem(error));
      },
    });
  }

  /** What was wrong does not concern what the form says now. */
  forget(): void {
    this.met.set(null);
  }

  /** What stands beside the field of this name; null where nothing is wrong. */
  field(name: string): string | null {
    return fieldWords(this.met()?.fields ?? [], `#/${name}`);
  }

  /** What stands under the form: all that no field of it says already. */
  words(fields: readonly string[]): string | null {
    const problem = this.met();
    if (!problem || (problem.fields.length > 0 && fields.some((name) => this.field(name)))) return null;
    return problemWords(problem);
  }
}
