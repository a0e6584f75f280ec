import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';

export type SizeAnswer = 'reduced' | 'cropped';

/** Asked once for a batch: a ratio alone cannot tell a crop from a reduction. Closes with the answer, or with nothing. */
@Component({
  selector: 'app-size-question',
  imports: [MatButtonModule, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title i18n>Reduced or cropped?</h2>
    <mat-dialog-content>
      <p i18n>
        {count, plural, =1 {One picture does} other {{{ count }} pictures do}} not have the size of the calibrated
        frame. What happened on the way?
      </p>
      <p><button mat-stroked-button mat-dialog-close="reduced" i18n>Reduced: the whole frame, fewer pixels</button></p>
      <p>
        <button mat-stroked-button mat-dialog-close="cropped" i18n>
          Cropped: a part of the frame, pixel for pixel
        </button>
      </p>
      <p class="soft" i18n>If you do not know, leave them without a scale: a wrong one is worse.</p>
    </mat-dialog-content>
    <mat-dialog-actions>
      <button mat-button mat-dialog-close cdkFocusInitial i18n>I do not know</button>
    </mat-dialog-actions>
  `,
  styles: `
    h2 {
      font: 700 1.15rem/1.3 var(--serif);
    }
    p {
      margin: 0 0 10px;
    }
  `,
})
export class SizeQuestion {
  protected readonly count = inject<number>(MAT_DIALOG_DATA);
}
