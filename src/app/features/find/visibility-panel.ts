import { ChangeDetectionStrategy, Component, inject, input, linkedSignal, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { findRoutes, type FindView } from '@shared/contracts/finds';
import { VISIBILITIES, type Visibility } from '@shared/permission/can';
import { Api } from '../../core/api';
import { Submission } from '../../core/submission';

const WORDS: Readonly<Record<Visibility, { readonly name: string; readonly meaning: string }>> = {
  private: { name: $localize`private`, meaning: $localize`Only you see it.` },
  group: { name: $localize`group`, meaning: $localize`Everybody signed in sees it.` },
  public: { name: $localize`public`, meaning: $localize`Everybody sees it, with the place as shown to all.` },
  held: { name: $localize`held until a day`, meaning: $localize`Only you see it until that day, then everybody.` },
};

/** The finder's choice of who sees the find. */
@Component({
  selector: 'app-visibility-panel',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visibility-panel.html',
  styleUrl: './panel.scss',
})
export class VisibilityPanel {
  private readonly api = inject(Api);

  readonly find = input.required<FindView>();
  readonly changed = output<FindView>();

  protected readonly choices = VISIBILITIES.map((value) => ({ value, ...WORDS[value] }));
  protected readonly chosen = linkedSignal(() => this.find().visibility);
  protected readonly until = linkedSignal(() => this.find().heldUntil ?? '');
  protected readonly submission = new Submission();
  protected readonly meaning = () => WORDS[this.chosen()].meaning;
  protected readonly differs = () =>
    this.chosen() !== this.find().visibility || (this.chosen() === 'held' && this.until() !== this.find().heldUntil);

  protected save(): void {
    const visibility = this.chosen();
    const body = { visibility, heldUntil: visibility === 'held' ? this.until() || null : null };
    const request = this.api.call(findRoutes.edit, { params: { findId: this.find().id }, body });
    this.submission.send(request, (find) => this.changed.emit(find));
  }
}
