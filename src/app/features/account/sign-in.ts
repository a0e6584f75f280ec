import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import type { Session, SignIn as Credentials } from '@shared/contracts/session';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { SessionStore } from '../../core/session-store';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { ownPath } from './own-path';
import { roleWords } from './role-words';

@Component({
  selector: 'app-sign-in',
  imports: [ReactiveFormsModule, RouterLink, MatButtonModule, MatFormFieldModule, MatInputModule, ProblemBox, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sign-in.html',
  styleUrls: ['./account.scss', './sign-in.scss'],
  host: { class: 'page' },
})
export class SignIn {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** where to go on, from the address: `?then=/desk/tray` */
  readonly then = input<string>();

  protected readonly demo = this.session.demo;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly words = controlWords;
  protected readonly roleWords = roleWords;
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    password: ['', Validators.required],
  });

  protected signIn(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    this.send(this.form.getRawValue(), element);
  }

  protected signInAs({ email, password }: Session['demo'][number]): void {
    this.send({ email, password });
  }

  private send(credentials: Credentials, element?: HTMLFormElement): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.session.signIn(credentials).subscribe({
      next: () => void this.router.navigateByUrl(ownPath(this.then()) ?? '/desk'),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (!showFieldProblems(this.form, problem)) this.problem.set(problem);
        if (element) element.querySelector<HTMLElement>('input[type=password]')?.focus();
      },
    });
  }
}
