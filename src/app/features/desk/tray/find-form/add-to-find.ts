import { CdkScrollable } from '@angular/cdk/scrolling';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { mdiClose } from '@mdi/js';
import { findRoutes, type FindView } from '@shared/contracts/finds';
import type { TrayPicture } from '@shared/contracts/images';
import { Api } from '../../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../../core/api-problem';
import { dayWords, today } from '../../../../core/day-words';
import { focusFirstInvalid, showFieldProblems } from '../../../../ui/forms/field-problems';
import { Icon } from '../../../../ui/icon/icon';
import { Picture } from '../../../../ui/picture/picture';
import { ProblemBox } from '../../../../ui/problem/problem';
import { TaxonName } from '../../../../ui/taxon-name/taxon-name';
import { fromFiles } from './find-draft';
import { dateHintOf } from './make-find';
import { observationGroup, ObservationFields } from './observation-fields';

/** The sheet that adds the chosen pictures to a find as a new observation: Thursday's slide to Sunday's find. */
@Component({
  selector: 'app-add-to-find',
  imports: [
    CdkScrollable,
    ReactiveFormsModule,
    MatButtonModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatRadioModule,
    Icon,
    ObservationFields,
    Picture,
    ProblemBox,
    TaxonName,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './add-to-find.html',
  styleUrls: ['../../../../ui/forms/sheet.scss', './add-to-find.scss'],
})
export class AddToFind {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<AddToFind, FindView>>(MatDialogRef);
  private readonly pictures = inject<readonly TrayPicture[]>(MAT_DIALOG_DATA);
  private readonly files = fromFiles(this.pictures);

  protected readonly icons = { close: mdiClose };
  protected readonly dayWords = dayWords;
  protected readonly count = this.pictures.length;
  protected readonly dateHint = dateHintOf(this.files);
  protected readonly finds = this.api.resource(findRoutes.mine, () => ({}));
  protected readonly query = signal('');
  protected readonly chosen = signal<string | null>(null);
  protected readonly busy = signal(false);
  protected readonly missing = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly form = observationGroup(inject(NonNullableFormBuilder), {
    day: this.files.day ?? today(),
    kind: 'at the bench',
  });

  protected readonly shown = computed(() => {
    const words = this.query().toLocaleLowerCase().split(/\s+/).filter(Boolean);
    if (this.finds.error()) return [];
    return (this.finds.value() ?? []).filter(({ number, name, publicWords, observedOn }) => {
      const text = `${number} ${name?.name ?? ''} ${publicWords} ${observedOn}`.toLocaleLowerCase();
      return words.every((word) => text.includes(word));
    });
  });

  protected add(element: HTMLFormElement): void {
    const findId = this.chosen();
    this.missing.set(findId === null);
    this.form.markAllAsTouched();
    if (findId === null) return element.querySelector<HTMLElement>('mat-radio-button input')?.focus();
    if (this.form.invalid) return focusFirstInvalid(element);
    const body = { imageIds: this.pictures.map(({ id }) => id), ...this.form.getRawValue() };
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(findRoutes.addObservation, { params: { findId }, body }).subscribe({
      next: (find) => this.dialog.close(find),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
