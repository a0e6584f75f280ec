import { TextFieldModule } from '@angular/cdk/text-field';
import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import {
  ReactiveFormsModule,
  Validators,
  type FormControl,
  type FormGroup,
  type NonNullableFormBuilder,
} from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { startWith, switchMap } from 'rxjs';
import { OBSERVATION_KINDS } from '@shared/contracts/finds';
import { controlWords } from '../../../../ui/forms/control-words';
import type { ObservationKind } from './find-draft';
import { KIND_WORDS, SUBSTRATES } from './place-words';

export type ObservationGroup = FormGroup<{
  kind: FormControl<ObservationKind>;
  observedOn: FormControl<string>;
  substrate: FormControl<string>;
  remarks: FormControl<string>;
}>;

/** Shaped like `NewObservation`, so that what the server says finds its field. */
export function observationGroup(
  form: NonNullableFormBuilder,
  start: { day: string; kind: ObservationKind },
): ObservationGroup {
  return form.group({
    kind: form.control<ObservationKind>(start.kind),
    observedOn: form.control(start.day, Validators.required),
    substrate: form.control('', Validators.maxLength(120)),
    remarks: form.control('', Validators.maxLength(2000)),
  });
}

/** One dated look: when, of which kind, on what. */
@Component({
  selector: 'app-observation-fields',
  imports: [
    ReactiveFormsModule,
    TextFieldModule,
    MatAutocompleteModule,
    MatButtonToggleModule,
    MatFormFieldModule,
    MatInputModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './observation-fields.html',
  styleUrl: './fields.scss',
})
export class ObservationFields {
  readonly group = input.required<ObservationGroup>();
  /** where the date comes from */
  readonly dateHint = input<string | null>(null);

  protected readonly kinds = OBSERVATION_KINDS;
  protected readonly kindWords = KIND_WORDS;
  protected readonly words = controlWords;

  private readonly typed = toSignal(
    toObservable(this.group).pipe(
      switchMap(({ controls }) => controls.substrate.valueChanges.pipe(startWith(controls.substrate.value))),
    ),
    { initialValue: '' },
  );
  protected readonly substrates = computed(() => {
    const typed = this.typed().trim().toLocaleLowerCase();
    return SUBSTRATES.filter((substrate) => substrate.toLocaleLowerCase().includes(typed));
  });
}
