import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { sessionRoutes } from '@shared/contracts/session';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';

/** Whether an e-mail is known here is not said, lest strangers try them out. */
@Component({
  selector: 'app-ask-reset',
  imports: [ReactiveFormsModule, RouterLink, MatButtonModule, MatFormFieldModule, MatInputModule, ProblemBox, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ask-reset.html',
  styleUrl: './account.scss',
  host: { class: 'page' },
})
export class AskReset {
  private readonly api = inject(Api);

  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly sentTo = signal<string | null>(null);
  protected readonly words = controlWords;
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
  });

  protected ask(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    const body = this.form.getRawValue();
    this.api.call(sessionRoutes.askReset, { body }).subscribe({
      next: () => this.sentTo.set(body.email),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
