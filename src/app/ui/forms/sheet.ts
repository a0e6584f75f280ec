import type { MatDialogConfig } from '@angular/material/dialog';

/** A form beside the page where there is room; on a phone the whole screen. Its look is `sheet.scss`. */
export const SHEET: MatDialogConfig = {
  width: '480px',
  maxWidth: '100vw',
  height: '100dvh',
  maxHeight: '100dvh',
  position: { top: '0', right: '0' },
};
