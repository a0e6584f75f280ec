import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { findRoutes, OBSERVATION_KINDS, type FindView } from '@shared/contracts/finds';
import { Api } from '../../core/api';
import { today } from '../../core/day-words';
import { focusOnceShown } from '../../core/focus-once-shown';
import { Submission } from '../../core/submission';
import { kindWords } from './observation-words';

/** Another dated look at the find, without pictures: those come by the sorting tray. */
@Component({
  selector: 'app-add-observation',
  imports: [ReactiveFormsModule, MatButtonModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './add-observation.html',
  styleUrl: './add-form.scss',
})
export class AddObservation {
  private readonly api = inject(Api);

  readonly findId = input.required<string>();
  readonly added = output<FindView>();
  readonly givenUp = output<void>();

  protected readonly kinds = OBSERVATION_KINDS.map((value) => ({ value, words: kindWords(value) }));
  protected readonly latest = today();
  protected readonly submission = new Submission();
  protected readonly form = inject(NonNullableFormBuilder).group({
    kind: ['revisit' as (typeof OBSERVATION_KINDS)[number]],
    observedOn: [today(), Validators.required],
    substrate: ['', Validators.maxLength(120)],
    remarks: ['', Validators.maxLength(2000)],
  });

  constructor() {
    focusOnceShown('input, mat-select')();
  }

  protected add(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return;
    const body = { ...this.form.getRawValue(), imageIds: [] };
    const request = this.api.call(findRoutes.addObservation, { params: { findId: this.findId() }, body });
    this.submission.send(request, (find) => this.added.emit(find));
  }
}
