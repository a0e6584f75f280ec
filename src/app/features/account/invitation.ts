import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router } from '@angular/router';
import { sessionRoutes } from '@shared/contracts/session';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { dayWords } from '../../core/day-words';
import { SessionStore } from '../../core/session-store';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { PASSWORD_RULES } from './password-rules';
import { roleWords } from './role-words';

@Component({
  selector: 'app-invitation',
  imports: [ReactiveFormsModule, MatButtonModule, MatFormFieldModule, MatInputModule, ProblemBox, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './invitation.html',
  styleUrl: './account.scss',
  host: { class: 'page' },
})
export class Invitation {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** from the address that the mail led to */
  readonly token = input.required<string>();

  private readonly accepted = signal(false);
  /** not asked again once it was taken: it is gone then */
  protected readonly invitation = this.api.resource(sessionRoutes.readInvitation, () =>
    this.accepted() ? undefined : { params: { token: this.token() } },
  );
  protected readonly canAskAgain = computed(() => toApiProblem(this.invitation.error()).status !== 404);
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly dayWords = dayWords;
  protected readonly words = controlWords;
  protected readonly roleWords = roleWords;
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    name: ['', [Validators.required, Validators.maxLength(80)]],
    password: ['', [Validators.required, ...PASSWORD_RULES]],
  });

  protected accept(element: HTMLFormElement): void {
    const named = Boolean(this.invitation.value()?.email);
    if (named) this.form.controls.email.disable(); // then it is not asked
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    const { email, name, password } = this.form.getRawValue();
    const body = { token: this.token(), name, password, ...(named ? {} : { email }) };
    this.api.call(sessionRoutes.accept, { body }).subscribe({
      next: (session) => {
        this.accepted.set(true);
        this.session.take(session);
        void this.router.navigateByUrl('/desk');
      },
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
