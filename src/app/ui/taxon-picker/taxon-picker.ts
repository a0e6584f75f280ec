import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { MatAutocompleteModule, type MatAutocompleteSelectedEvent } from '@angular/material/autocomplete';
import type { NameView } from '@shared/contracts/common';
import type { TaxonName as Taxon } from '@shared/contracts/taxa';
import { rankWords } from '../../core/rank-words';
import { TaxonStore } from '../../core/taxon-store';
import { problemWords } from '../../core/problem-words';
import { TaxonName } from '../taxon-name/taxon-name';

let pickers = 0;

/**
 * A field that knows the list of taxa: forgiving of slips, led by the keyboard alone if wanted, and
 * beginning with the names last chosen. A synonym may be typed; the name in use is what is picked.
 */
@Component({
  selector: 'app-taxon-picker',
  imports: [MatAutocompleteModule, TaxonName],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './taxon-picker.html',
  styleUrl: './taxon-picker.scss',
})
export class TaxonPicker {
  private readonly taxa = inject(TaxonStore);

  readonly label = input.required<string>();
  /** shows the picked name in the field; otherwise the field empties for the next */
  readonly keep = input(false);
  /** what is wrong with it, from the form around it */
  readonly error = input<string | null>(null);
  readonly picked = output<Taxon>();
  /** the words no longer are the picked name */
  readonly cleared = output<void>();

  protected readonly id = `taxon-picker-${++pickers}`;
  protected readonly words = signal('');
  private readonly found = signal<readonly Taxon[]>([]);
  protected readonly searched = signal('');
  private turn = 0;

  protected readonly choices = computed(() =>
    (this.words().trim() ? this.found() : this.taxa.recent()).map((taxon) => {
      const accepted = this.taxa.accepted(taxon);
      return {
        taxon: accepted,
        name: this.nameOf(taxon),
        insteadOf: accepted === taxon ? null : this.nameOf(accepted),
        rank: rankWords(taxon.rank),
      };
    }),
  );
  protected readonly nothing = computed(
    () => this.searched() !== '' && this.searched() === this.words() && this.found().length === 0,
  );
  protected readonly problem = computed(() => {
    const problem = this.taxa.problem();
    return problem ? problemWords(problem) : null;
  });
  protected readonly display = (taxon: Taxon | string | null): string =>
    taxon === null || !this.keep() ? '' : typeof taxon === 'string' ? taxon : taxon.name;

  private readonly field = viewChild.required<ElementRef<HTMLInputElement>>('field');

  constructor() {
    // words typed while a page from the server was not awake yet are words all the same
    afterNextRender(() => {
      const { nativeElement } = this.field();
      if (nativeElement.value) nativeElement.dispatchEvent(new Event('input'));
    });
  }

  protected prepare(): void {
    void this.taxa.load();
  }

  /** Only the answer to the newest words counts. */
  protected async search(words: string): Promise<void> {
    this.words.set(words);
    this.cleared.emit();
    const turn = ++this.turn;
    if (!words.trim()) return;
    const found = await this.taxa.search(words);
    if (turn !== this.turn) return;
    this.found.set(found);
    this.searched.set(words);
  }

  protected pick(event: MatAutocompleteSelectedEvent): void {
    const taxon = event.option.value as Taxon;
    this.turn++;
    this.words.set(this.keep() ? taxon.name : '');
    this.found.set([]);
    this.searched.set('');
    this.taxa.remember(taxon);
    this.picked.emit(taxon);
  }

  private nameOf(taxon: Taxon): NameView {
    const { name, authorship, rank, code } = taxon;
    return { name, authorship, rank, code, qualifier: '' };
  }
}
