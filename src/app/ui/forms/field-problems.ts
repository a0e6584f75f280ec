import type { AbstractControl } from '@angular/forms';
import type { ApiProblem } from '../../core/api-problem';
import { fieldWords } from '../../core/problem-words';

/**
 * Puts what the server has against a request beside its fields. The form must be shaped like the request's
 * body: `#/place/publicWords` is the control `publicWords` of the group `place`.
 *
 * @returns whether every complaint found its field; if not, the problem itself must be shown too
 */
export function showFieldProblems(form: AbstractControl, problem: ApiProblem): boolean {
  const placed = problem.fields.map(({ pointer }) => {
    const control = form.get(pointer.replace(/^#?\//, '').split('/'));
    control?.setErrors({ server: fieldWords(problem.fields, pointer) });
    control?.markAsTouched();
    return control !== null;
  });
  return placed.length > 0 && placed.every(Boolean);
}

/** Takes the reader to the first field that needs mending. */
export function focusFirstInvalid(form: HTMLElement): void {
  // After the next paint: the words beside the field stand there only then, and are read out with it.
  setTimeout(() =>
    form
      .querySelector<HTMLElement>(
        'input.ng-invalid, textarea.ng-invalid, mat-select.ng-invalid, mat-button-toggle-group.ng-invalid button',
      )
      ?.focus(),
  );
}
