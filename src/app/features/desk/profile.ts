import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router } from '@angular/router';
import { LICENCES } from '@shared/contracts/common';
import { sessionRoutes, type Me } from '@shared/contracts/session';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { LICENCE_WORDS } from '../../core/licence-words';
import { SessionStore } from '../../core/session-store';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { ProblemBox } from '../../ui/problem/problem';
import { Rule } from '../../ui/rule/rule';
import { ACCEPT } from './uploads/picture-files';

@Component({
  selector: 'app-profile',
  imports: [
    ReactiveFormsModule,
    MatButtonModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    ProblemBox,
    Rule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './profile.html',
  styleUrl: './profile.scss',
  host: { class: 'page' },
})
export class Profile {
  private readonly api = inject(Api);
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  protected readonly user = this.session.user;
  protected readonly licences = LICENCES;
  protected readonly licenceWords = LICENCE_WORDS;
  protected readonly accept = ACCEPT;
  protected readonly words = controlWords;
  protected readonly busy = signal(false);
  protected readonly saved = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly sendingPortrait = signal(false);
  protected readonly portraitProblem = signal<ApiProblem | null>(null);
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: [this.user()?.name ?? '', [Validators.required, Validators.maxLength(80)]],
    creditLine: [this.user()?.creditLine ?? '', [Validators.required, Validators.maxLength(120)]],
    defaultLicence: [this.user()?.defaultLicence ?? 'by'],
    // between what a child's and what a large hand's may be; the contract has the same limits
    fingertipMm: new FormControl(this.user()?.fingertipMm ?? null, [Validators.min(8), Validators.max(35)]),
  });

  protected save(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    this.saved.set(false);
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(sessionRoutes.saveProfile, { body: this.form.getRawValue() }).subscribe({
      next: (me) => {
        this.session.takeUser(me);
        this.busy.set(false);
        this.saved.set(true);
      },
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }

  protected savePortrait(input: HTMLInputElement): void {
    const file = input.files?.[0];
    if (!file) return;
    const body = new FormData();
    body.append('portrait', file);
    this.sendingPortrait.set(true);
    this.portraitProblem.set(null);
    this.http.put<Me>(sessionRoutes.savePortrait.path, body).subscribe({
      next: (me) => {
        this.session.takeUser(me);
        this.sendingPortrait.set(false);
      },
      error: (error: unknown) => {
        this.portraitProblem.set(toApiProblem(error));
        this.sendingPortrait.set(false);
      },
    });
    input.value = ''; // so that the same file can be chosen again
  }

  protected signOut(): void {
    const leave = () => void this.router.navigateByUrl('/');
    this.session.signOut().subscribe({ next: leave, error: leave });
  }
}
