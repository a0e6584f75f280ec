import { CdkScrollable } from '@angular/cdk/scrolling';
import { ChangeDetectionStrategy, Component, DOCUMENT, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl, NonNullableFormBuilder, ReactiveFormsModule, type AbstractControl } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { mdiClose } from '@mdi/js';
import { findRoutes, type FindView } from '@shared/contracts/finds';
import type { TrayPicture } from '@shared/contracts/images';
import { VISIBILITIES } from '@shared/permission/can';
import { Api } from '../../../../core/api';
import { toApiProblem, type ApiProblem } from '../../../../core/api-problem';
import { today } from '../../../../core/day-words';
import { SessionStore } from '../../../../core/session-store';
import { controlWords } from '../../../../ui/forms/control-words';
import { focusFirstInvalid, showFieldProblems } from '../../../../ui/forms/field-problems';
import { Icon } from '../../../../ui/icon/icon';
import { Picture } from '../../../../ui/picture/picture';
import { ProblemBox } from '../../../../ui/problem/problem';
import { fromFiles, LastFindMemory, lastFindOf, lastFindWords, type LastFind, type Visibility } from './find-draft';
import { observationGroup, ObservationFields } from './observation-fields';
import { PlaceFields, placeGroup } from './place-fields';
import { VISIBILITY_WORDS } from './place-words';

/** So many of the chosen pictures are shown on top; more would not fit. */
const MOST_SHOWN = 6;

/** The sheet that makes a find of the chosen pictures. Closes with the find, or with nothing. */
@Component({
  selector: 'app-make-find',
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
    PlaceFields,
    ProblemBox,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './make-find.html',
  styleUrls: ['../../../../ui/forms/sheet.scss', './make-find.scss'],
})
export class MakeFind {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<MakeFind, FindView>>(MatDialogRef);
  private readonly builder = inject(NonNullableFormBuilder);
  private readonly pictures = inject<readonly TrayPicture[]>(MAT_DIALOG_DATA);
  private readonly memory = new LastFindMemory(
    inject(DOCUMENT).defaultView?.localStorage ?? null,
    inject(SessionStore).user()?.id ?? '',
  );

  protected readonly icons = { close: mdiClose };
  protected readonly count = this.pictures.length;
  protected readonly images = this.pictures.flatMap(({ image }) => image ?? []).slice(0, MOST_SHOWN);
  protected readonly files = fromFiles(this.pictures);
  protected readonly dateHint = dateHintOf(this.files);
  protected readonly last = this.memory.read();
  protected readonly lastWords = this.last ? lastFindWords(this.last) : '';
  protected readonly visibilities = VISIBILITIES;
  protected readonly visibilityWords = VISIBILITY_WORDS;
  protected readonly words = controlWords;
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);

  /** Shaped like `NewFind`, so that what the server says finds its field. */
  protected readonly form = this.builder.group({
    observation: observationGroup(this.builder, { day: this.files.day ?? today(), kind: 'in the field' }),
    place: placeGroup(this.builder, this.files.place),
    visibility: this.builder.control<Visibility>('private'),
    heldUntil: new FormControl<string | null>(null, neededWhenHeld),
  });

  constructor() {
    const { visibility, heldUntil } = this.form.controls;
    visibility.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => heldUntil.updateValueAndValidity());
  }

  protected takeOver(last: LastFind): void {
    this.form.patchValue({
      observation: { kind: last.kind, substrate: last.substrate },
      place: { exact: { words: last.exactWords }, publicWords: last.publicWords, sensitivity: last.sensitivity },
      visibility: last.visibility,
    });
  }

  protected make(element: HTMLFormElement): void {
    this.form.markAllAsTouched();
    if (this.form.invalid) return focusFirstInvalid(element);
    const { heldUntil, ...rest } = this.form.getRawValue();
    const body = {
      imageIds: this.pictures.map(({ id }) => id),
      ...rest,
      heldUntil: rest.visibility === 'held' ? heldUntil : null,
    };
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    this.api.call(findRoutes.make, { body }).subscribe({
      next: (find) => {
        this.memory.write(lastFindOf(body));
        this.dialog.close(find);
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

function neededWhenHeld(control: AbstractControl): { required: true } | null {
  return control.parent?.get('visibility')?.value === 'held' && !control.value ? { required: true } : null;
}

export function dateHintOf(files: { readonly day: string | null; readonly severalDays: boolean }): string | null {
  if (files.severalDays) return $localize`The pictures are of several days; this is the first.`;
  return files.day === null ? $localize`The files say no date; this is today.` : $localize`Read from the pictures.`;
}
