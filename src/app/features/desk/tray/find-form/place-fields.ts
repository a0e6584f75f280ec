import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import {
  FormControl,
  ReactiveFormsModule,
  Validators,
  type AbstractControl,
  type FormGroup,
  type NonNullableFormBuilder,
  type ValidationErrors,
} from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { map, startWith, switchMap } from 'rxjs';
import { SENSITIVITIES } from '@shared/contracts/finds';
import { controlWords } from '../../../../ui/forms/control-words';
import { givesAway, type FromFiles, type Sensitivity } from './find-draft';
import { SENSITIVITY_WORDS } from './place-words';

export type PlaceGroup = FormGroup<{
  exact: FormGroup<{
    words: FormControl<string>;
    latitude: FormControl<number | null>;
    longitude: FormControl<number | null>;
    uncertaintyM: FormControl<number | null>;
  }>;
  publicWords: FormControl<string>;
  sensitivity: FormControl<Sensitivity>;
}>;

/** Shaped like `PlaceInput`. A degree alone says nothing, so each of the two asks for the other. */
export function placeGroup(form: NonNullableFormBuilder, place: FromFiles['place']): PlaceGroup {
  const group: PlaceGroup = form.group({
    exact: form.group({
      words: form.control('', Validators.maxLength(200)),
      latitude: new FormControl(place?.latitude ?? null, [
        Validators.min(-90),
        Validators.max(90),
        needsOther('longitude'),
      ]),
      longitude: new FormControl(place?.longitude ?? null, [
        Validators.min(-180),
        Validators.max(180),
        needsOther('latitude'),
      ]),
      uncertaintyM: new FormControl<number | null>(null, Validators.min(1)),
    }),
    publicWords: form.control('', Validators.maxLength(120)),
    sensitivity: form.control<Sensitivity>('medium'), // whoever says nothing gives no exact place away
  });
  return group;
}

function needsOther(name: 'latitude' | 'longitude') {
  return (control: AbstractControl): ValidationErrors | null => {
    const other: unknown = control.parent?.get(name)?.value;
    return control.value === null && typeof other === 'number' ? { required: true } : null;
  };
}

/** Where: exactly for the finder, broadly for everybody else, as two fields in words and in numbers. */
@Component({
  selector: 'app-place-fields',
  imports: [ReactiveFormsModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './place-fields.html',
  styleUrl: './fields.scss',
})
export class PlaceFields {
  readonly group = input.required<PlaceGroup>();
  /** the coordinates come from the picture */
  readonly fromFile = input(false);

  protected readonly sensitivities = SENSITIVITIES;
  protected readonly sensitivityWords = SENSITIVITY_WORDS;
  protected readonly words = controlWords;

  /** undefined before the first rendering */
  private readonly value = toSignal(
    toObservable(this.group).pipe(
      switchMap((group) =>
        group.valueChanges.pipe(
          startWith(null),
          map(() => group.getRawValue()),
        ),
      ),
    ),
  );
  protected readonly sensitivity = computed(() => this.value()?.sensitivity ?? 'medium');
  protected readonly saysTooMuch = computed(() => {
    const value = this.value();
    return value !== undefined && givesAway(value.publicWords, value.exact.words);
  });
}
