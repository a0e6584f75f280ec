import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The mark: a mote above a graduated rule. */
@Component({
  selector: 'app-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 24 24" width="26" height="26" aria-hidden="true">
      <circle cx="12" cy="8" r="5" fill="var(--rust)" />
      <path d="M2 15.5v5h20v-5M7 20.5v-3M12 20.5v-4M17 20.5v-3" fill="none" stroke="currentColor" stroke-width="1.6" />
    </svg>
  `,
})
export class Mark {}
