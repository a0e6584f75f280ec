import { CdkScrollable } from '@angular/cdk/scrolling';
import { CdkTextareaAutosize } from '@angular/cdk/text-field';
import { ChangeDetectionStrategy, Component, inject, signal, type Injector } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { MAT_DIALOG_DATA, MatDialog, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { mdiClose } from '@mdi/js';
import { LICENCES } from '@shared/contracts/common';
import type { FindPicture, PreparationView } from '@shared/contracts/finds';
import { imageRoutes, LIGHTS, type ImageView } from '@shared/contracts/images';
import { filter, type Observable } from 'rxjs';
import { Api } from '../../core/api';
import { toApiProblem, type ApiProblem } from '../../core/api-problem';
import { LICENCE_WORDS } from '../../core/licence-words';
import { lightWords } from '../../core/light-words';
import { controlWords } from '../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../ui/forms/field-problems';
import { SHEET } from '../../ui/forms/sheet';
import { Icon } from '../../ui/icon/icon';
import { Picture } from '../../ui/picture/picture';
import { ProblemBox } from '../../ui/problem/problem';

export interface Described {
  readonly picture: FindPicture;
  /** of the picture's observation */
  readonly preparations: readonly PreparationView[];
}

/** Opens the sheet; answers once, with the picture as it was kept, or not at all. */
export function openPictureDetails(injector: Injector, described: Described): Observable<ImageView> {
  const sheet = injector.get(MatDialog).open<PictureDetails, Described, ImageView>(PictureDetails, {
    ...SHEET,
    data: described,
  });
  return sheet.afterClosed().pipe(filter((image) => image !== undefined));
}

/** What the owner of a picture says of it. Closes with the picture as it was kept, or with nothing. */
@Component({
  selector: 'app-picture-details',
  imports: [
    CdkScrollable,
    CdkTextareaAutosize,
    ReactiveFormsModule,
    MatButtonModule,
    MatButtonToggleModule,
    MatDialogModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    Icon,
    Picture,
    ProblemBox,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './picture-details.html',
  styleUrls: ['../../ui/forms/sheet.scss', './picture-details.scss'],
})
export class PictureDetails {
  private readonly api = inject(Api);
  private readonly sheet = inject<MatDialogRef<PictureDetails, ImageView>>(MatDialogRef);
  private readonly described = inject<Described>(MAT_DIALOG_DATA);

  protected readonly close = mdiClose;
  protected readonly picture = this.described.picture;
  protected readonly preparations = this.described.preparations;
  protected readonly lights = LIGHTS;
  protected readonly lightWords = lightWords;
  protected readonly licences = LICENCES;
  protected readonly licenceWords = LICENCE_WORDS;
  protected readonly words = controlWords;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);

  /** Shaped like `EditImage`, so that what the server says finds its field. */
  protected readonly form = inject(NonNullableFormBuilder).group({
    title: [this.picture.title, Validators.maxLength(120)],
    altText: [this.picture.altText, Validators.maxLength(400)],
    light: [this.picture.light],
    role: [this.picture.role],
    preparationId: [this.picture.preparationId],
    licence: [this.picture.licence],
    creditLine: [this.picture.creditLine, [Validators.required, Validators.maxLength(120), Validators.pattern(/\S/)]],
  });

  protected keep(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    if (this.busy()) return;
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    const call = { params: { imageId: this.picture.id }, body: this.form.getRawValue() };
    this.api.call(imageRoutes.edit, call).subscribe({
      next: (image) => this.sheet.close(image),
      error: (error: unknown) => {
        const problem = toApiProblem(error);
        this.busy.set(false);
        if (showFieldProblems(this.form, problem)) focusFirstInvalid(element);
        else this.problem.set(problem);
      },
    });
  }
}
