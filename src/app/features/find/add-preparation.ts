import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { findRoutes, type FindView, type ObservationView } from '@shared/contracts/finds';
import { Api } from '../../core/api';
import { focusOnceShown } from '../../core/focus-once-shown';
import { Submission } from '../../core/submission';
import { CONDITIONS, conditionWords } from './observation-words';

/** What lies on a slide or under the lens at this observation, and which of its pictures show it. */
@Component({
  selector: 'app-add-preparation',
  imports: [ReactiveFormsModule, MatButtonModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './add-preparation.html',
  styleUrl: './add-form.scss',
})
export class AddPreparation {
  private readonly api = inject(Api);

  readonly findId = input.required<string>();
  readonly observation = input.required<ObservationView>();
  /** what the find's pictures are called, by their ids */
  readonly names = input.required<ReadonlyMap<string, string>>();
  readonly added = output<FindView>();
  readonly givenUp = output<void>();

  protected readonly conditions = CONDITIONS.map((value) => ({ value, words: conditionWords(value) }));
  protected readonly pictures = computed(() =>
    this.observation()
      .pictures.filter((picture) => picture.preparationId === null)
      .map(({ id }) => ({ id, words: this.names().get(id) ?? '' })),
  );
  protected readonly submission = new Submission();
  protected readonly form = inject(NonNullableFormBuilder).group({
    title: ['', [Validators.required, Validators.maxLength(60), Validators.pattern(/\S/)]],
    part: ['', Validators.maxLength(60)],
    medium: ['', Validators.maxLength(60)],
    stain: ['', Validators.maxLength(60)],
    condition: ['unknown' as (typeof CONDITIONS)[number]],
    imageIds: [[] as string[]],
  });

  constructor() {
    focusOnceShown('input, mat-select')();
  }

  protected add(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return;
    const body = { observationId: this.observation().id, ...this.form.getRawValue() };
    const request = this.api.call(findRoutes.addPreparation, { params: { findId: this.findId() }, body });
    this.submission.send(request, (find) => this.added.emit(find));
  }
}
