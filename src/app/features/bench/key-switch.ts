import { DOCUMENT, inject, Injectable, signal } from '@angular/core';

const KEY = 'bench-letters';

/** Whether single letters and digits act; people who dictate turn them off (WCAG 2.2, 2.1.4). */
@Injectable({ providedIn: 'root' })
export class KeySwitch {
  private readonly document = inject(DOCUMENT);
  private readonly letters = signal(this.stored());
  readonly on = this.letters.asReadonly();

  turn(on: boolean): void {
    this.letters.set(on);
    try {
      this.document.defaultView?.localStorage.setItem(KEY, on ? 'on' : 'off');
    } catch {
      // Storage is closed to us: it holds until the page is left.
    }
  }

  private stored(): boolean {
    try {
      return this.document.defaultView?.localStorage.getItem(KEY) !== 'off';
    } catch {
      return true;
    }
  }
}
