import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButtonModule } from '@angular/material/button';
import { MatCheckboxModule } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import { CONFIDENCES, findRoutes, QUALIFIERS, type FindView } from '@shared/contracts/finds';
import type { TaxonName } from '@shared/contracts/taxa';
import { of, switchMap, type Observable } from 'rxjs';
import { Api } from '../../core/api';
import { focusOnceShown } from '../../core/focus-once-shown';
import { Submission } from '../../core/submission';
import { TaxonPicker } from '../../ui/taxon-picker/taxon-picker';
import { confidenceWords } from './confidence-words';

const QUALIFIER_WORDS: Readonly<Record<(typeof QUALIFIERS)[number], string>> = {
  '': $localize`none`,
  'cf.': $localize`cf. (looks like it, not checked in full)`,
  'aff.': $localize`aff. (near it, held to be another)`,
  'sp.': $localize`sp. (the genus only)`,
  'indet.': $localize`indet. (cannot be taken further)`,
  'agg.': $localize`agg. (one of a group of species)`,
  '?': $localize`? (doubtful)`,
};

/** Giving a find a name: which, how sure, and why. */
@Component({
  selector: 'app-give-name',
  imports: [
    ReactiveFormsModule,
    MatButtonModule,
    MatCheckboxModule,
    MatFormFieldModule,
    MatInputModule,
    MatRadioModule,
    MatSelectModule,
    TaxonPicker,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './give-name.html',
  styleUrls: ['./panel.scss', './give-name.scss'],
})
export class GiveName {
  private readonly api = inject(Api);

  readonly find = input.required<FindView>();
  readonly given = output<FindView>();
  readonly givenUp = output<void>();

  protected readonly qualifiers = QUALIFIERS.map((value) => ({ value, words: QUALIFIER_WORDS[value] }));
  protected readonly confidences = CONFIDENCES.map((value) => ({ value, words: confidenceWords(value) }));
  protected readonly taxon = signal<TaxonName | null>(null);
  protected readonly taxonMissing = signal(false);
  protected readonly submission = new Submission();
  protected readonly form = inject(NonNullableFormBuilder).group({
    qualifier: ['' as (typeof QUALIFIERS)[number]],
    confidence: ['fairly sure' as (typeof CONFIDENCES)[number]],
    reason: ['', [Validators.required, Validators.maxLength(2000), Validators.pattern(/\S/)]],
    stands: [true],
  });

  constructor() {
    focusOnceShown('input, mat-select')();
  }

  protected pick(taxon: TaxonName | null): void {
    this.taxon.set(taxon);
    if (taxon) this.taxonMissing.set(false);
  }

  protected give(): void {
    const taxon = this.taxon();
    this.taxonMissing.set(!taxon);
    this.form.markAllAsTouched();
    if (!taxon || this.form.invalid) return;
    const { qualifier, confidence, reason, stands } = this.form.getRawValue();
    const body = { taxonId: taxon.id, qualifier, confidence, reason };
    const params = { findId: this.find().id };
    const request = this.api
      .call(findRoutes.determine, { params, body })
      .pipe(switchMap((find) => (stands && find.may.decide ? this.letNewestStand(find) : of(find))));
    this.submission.send(request, (find) => this.given.emit(find));
  }

  /** The finder's choice in the same step; not asked where it stands already. */
  private letNewestStand(find: FindView): Observable<FindView> {
    const before = new Set(this.find().determinations.map((each) => each.id));
    const added = find.determinations.find((each) => !before.has(each.id));
    if (!added || added.stands) return of(find);
    return this.api.call(findRoutes.decide, { params: { findId: find.id, determinationId: added.id } });
  }
}
