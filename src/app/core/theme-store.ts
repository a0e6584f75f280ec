import { DOCUMENT, inject, Injectable, signal } from '@angular/core';

export const THEMES = ['auto', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];
const KEY = 'theme'; // `public/theme.js` reads it before the first paint

/** Light, dark or as the system has it. */
@Injectable({ providedIn: 'root' })
export class ThemeStore {
  private readonly document = inject(DOCUMENT);
  private readonly chosen = signal<Theme>(this.stored());
  readonly theme = this.chosen.asReadonly();

  choose(theme: Theme): void {
    this.chosen.set(theme);
    const { dataset } = this.document.documentElement;
    if (theme === 'auto') delete dataset['theme'];
    else dataset['theme'] = theme;
    try {
      this.document.defaultView?.localStorage.setItem(KEY, theme);
    } catch {
      // Storage may be closed to us; the choice then holds until the page is left.
    }
  }

  private stored(): Theme {
    try {
      const kept = this.document.defaultView?.localStorage?.getItem(KEY);
      return THEMES.find((theme) => theme === kept) ?? 'auto';
    } catch {
      return 'auto';
    }
  }
}
