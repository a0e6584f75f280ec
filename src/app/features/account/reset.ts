import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
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
import { PASSWORD_RULES } from './password-rules';

@Component({
  selector: 'app-reset',
  imports: [ReactiveFormsModule, RouterLink, MatButtonModule, MatFormFieldModule, MatInputModule, ProblemBox, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './reset.html',
  styleUrl: './account.scss',
  host: { class: 'page' },
})
export class Reset {
  private readonly api = inject(Api);

  /** from the address that the mail led to */
  readonly token = input.required<string>();

  protected readonly busy = signal(false);
  protected readonly done = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly words = controlWords;
  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', [Validators.required, ...PASSWORD_RULES]],
  });

  protected save(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(sessionRoutes.reset, { body: { token: this.token(), ...this.form.getRawValue() } }).subscribe({
      next: () => this.done.set(true),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
