import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatCheckboxModule } from '@angular/material/checkbox';
import { MatDialogModule } from '@angular/material/dialog';
import { structureWords } from '../../core/structure-words';
import { KeySwitch } from './key-switch';
import { POINT_KEY, ROUND_KEY, STRUCTURE_KEYS } from './structure-keys';

/** All keys of the bench, and the switch that turns the single letters off. */
@Component({
  selector: 'app-key-help',
  imports: [MatDialogModule, MatButtonModule, MatCheckboxModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title i18n>Keys of the bench</h2>
    <mat-dialog-content>
      <dl>
        @for (row of rows; track row.words) {
          <dt>
            @for (key of row.keys; track key) {
              <kbd>{{ key }}</kbd>
            }
          </dt>
          <dd>{{ row.words }}</dd>
        }
      </dl>
      <mat-checkbox [checked]="on()" (change)="turn($event.checked)" i18n
        >Single letters and digits act (turn off for dictation)</mat-checkbox
      >
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" mat-button mat-dialog-close i18n>Close</button>
    </mat-dialog-actions>
  `,
  styles: `
    dl {
      display: grid;
      grid-template-columns: auto 1fr;
      gap: 4px 16px;
      margin: 0 0 16px;
    }
    dt {
      white-space: nowrap;
    }
    dd {
      margin: 0;
    }
    kbd {
      display: inline-block;
      min-width: 1.6em;
      padding: 0 5px;
      border: 1px solid var(--line-strong);
      font: 600 0.875rem var(--sans);
      text-align: center;
    }
  `,
})
export class KeyHelp {
  private readonly keySwitch = inject(KeySwitch);
  protected readonly on = computed(() => this.keySwitch.on());
  protected readonly rows: readonly { readonly keys: readonly string[]; readonly words: string }[] = [
    ...Object.entries(STRUCTURE_KEYS).map(([structure, key]) => ({
      keys: [key.toUpperCase()],
      words: $localize`measure: ${structureWords(structure)}`,
    })),
    { keys: [POINT_KEY.toUpperCase()], words: $localize`point at it` },
    { keys: [ROUND_KEY.toUpperCase()], words: $localize`draw round it` },
    { keys: ['←', '↑', '→', '↓'], words: $localize`with a tool: a cross-hair to draw with (Shift: 10 px)` },
    { keys: ['Space', 'Enter'], words: $localize`set a point at the cross-hair; Enter also ends a path` },
    { keys: ['Space'], words: $localize`held, with the mouse: move the picture` },
    { keys: ['Esc'], words: $localize`drop what is begun, then the tool, then the selection` },
    { keys: ['Tab'], words: $localize`from note to note; Shift and Tab back` },
    { keys: ['.'], words: $localize`the next handle of the selected note; arrows move it (Shift: 10 px, Alt: 0.1 px)` },
    { keys: ['Enter'], words: $localize`word the selected note` },
    { keys: ['Del'], words: $localize`take the selected note away, or the last point of a path` },
    { keys: ['Ctrl Z'], words: $localize`undo; with Shift, redo` },
    { keys: ['+', '−', '0', '1'], words: $localize`nearer, farther, the whole picture, pixel for pixel` },
    { keys: ['←', '→'], words: $localize`with nothing in hand: the other pictures of this slide` },
    { keys: ['?'], words: $localize`this list` },
  ];

  protected turn(on: boolean): void {
    this.keySwitch.turn(on);
  }
}
