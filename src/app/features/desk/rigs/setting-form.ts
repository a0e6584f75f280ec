import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import {
  FormControl,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  Validators,
  type AbstractControl,
} from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatCheckboxModule } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { rigRoutes, type RigView, type SettingView } from '@shared/contracts/rigs';
import { Api } from '../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../core/api-problem';
import { controlWords } from '../../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../../ui/forms/field-problems';
import { ProblemBox } from '../../../ui/problem/problem';

/** No objective reaches further: oil of the highest index. */
const LARGEST_APERTURE = 1.7;

@Component({
  selector: 'app-setting-form',
  imports: [
    ReactiveFormsModule,
    MatButtonModule,
    MatCheckboxModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    ProblemBox,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './setting-form.html',
  styleUrl: './rig-form.scss',
})
export class SettingForm {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<SettingForm, SettingView>>(MatDialogRef);
  protected readonly rig = inject<RigView>(MAT_DIALOG_DATA);

  protected readonly words = controlWords;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(80)]],
    objective: ['', Validators.maxLength(80)],
    magnification: new FormControl<number | null>(null, moreThanZero),
    numericalAperture: new FormControl<number | null>(null, [moreThanZero, Validators.max(LARGEST_APERTURE)]),
    oneSitting: [false],
    captureMode: ['', Validators.maxLength(80)],
  });

  protected add(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    const call = { params: { rigId: this.rig.id }, body: this.form.getRawValue() };
    this.api.call(rigRoutes.addSetting, call).subscribe({
      next: (setting) => this.dialog.close(setting),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}

function moreThanZero({ value }: AbstractControl<number | null>): { server: string } | null {
  return value === null || value > 0 ? null : { server: $localize`This must be more than zero.` };
}
