import { ChangeDetectionStrategy, Component, inject, signal, viewChild } from '@angular/core';
import { FormGroupDirective, NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { keepRoutes, type PeopleView } from '@shared/contracts/keep';
import { ROLES, type Role } from '@shared/permission/can';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { dayWords } from '../../core/day-words';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { ProblemBox } from '../../ui/problem/problem';

export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  photographer: $localize`photographer`,
  identifier: $localize`identifier`,
  editor: $localize`editor`,
  keeper: $localize`keeper`,
};

/** Who is here, with which role, and who is invited. */
@Component({
  selector: 'app-people',
  imports: [ReactiveFormsModule, MatButtonModule, MatFormFieldModule, MatInputModule, MatSelectModule, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './people.html',
  styleUrls: ['./keep-table.scss', './people.scss'],
})
export class People {
  private readonly api = inject(Api);
  private readonly formDirective = viewChild(FormGroupDirective);

  protected readonly roles = ROLES;
  protected readonly roleWords = ROLE_WORDS;
  protected readonly dayWords = dayWords;
  protected readonly words = controlWords;
  protected readonly view = this.api.resource(keepRoutes.people, () => ({}));
  protected readonly busy = signal(false);
  protected readonly invited = signal<string | null>(null);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    role: ['photographer' as Role],
  });

  protected invite(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    this.invited.set(null);
    if (this.form.invalid) return focusFirstInvalid(element);
    const body = this.form.getRawValue();
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(keepRoutes.invite, { body }).subscribe({
      next: (invitation) => {
        this.busy.set(false);
        this.invited.set(body.email);
        this.formDirective()?.resetForm({ email: '', role: body.role });
        this.change((view) => ({ ...view, invitations: [...view.invitations, invitation] }));
      },
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }

  protected withdraw(invitationId: string): void {
    this.api.call(keepRoutes.withdrawInvitation, { params: { invitationId } }).subscribe({
      next: () =>
        this.change((view) => ({ ...view, invitations: view.invitations.filter(({ id }) => id !== invitationId) })),
      error: (error: unknown) => this.problem.set(toApiProblem(error)),
    });
  }

  /** The select shows the old role again where the server refuses, as for the last keeper. */
  protected changeRole(person: PeopleView['people'][number], select: HTMLSelectElement): void {
    this.problem.set(null);
    const body = { role: select.value as Role };
    this.api.call(keepRoutes.changeRole, { params: { personId: person.id }, body }).subscribe({
      next: (changed) =>
        this.change((view) => ({ ...view, people: view.people.map((old) => (old.id === changed.id ? changed : old)) })),
      error: (error: unknown) => {
        select.value = person.role;
        this.problem.set(toApiProblem(error));
      },
    });
  }

  protected roleLabel(name: string): string {
    return $localize`Role of ${name}`;
  }

  protected withdrawLabel(email: string): string {
    return $localize`Withdraw the invitation to ${email}`;
  }

  private change(change: (view: PeopleView) => PeopleView): void {
    this.view.update((view) => (view ? change(view) : view));
  }
}
