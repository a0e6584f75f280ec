import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { rigRoutes, type RigView } from '@shared/contracts/rigs';
import { Api } from '../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../core/api-problem';
import { controlWords } from '../../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../../ui/forms/field-problems';
import { ProblemBox } from '../../../ui/problem/problem';

@Component({
  selector: 'app-rig-form',
  imports: [ReactiveFormsModule, MatButtonModule, MatDialogModule, MatFormFieldModule, MatInputModule, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './rig-form.html',
  styleUrl: './rig-form.scss',
})
export class RigForm {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<RigForm, RigView>>(MatDialogRef);

  protected readonly words = controlWords;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(80)]],
    camera: ['', Validators.maxLength(80)],
    remarks: ['', Validators.maxLength(400)],
  });

  protected add(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(rigRoutes.add, { body: this.form.getRawValue() }).subscribe({
      next: (rig) => this.dialog.close(rig),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
