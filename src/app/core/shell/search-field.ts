import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router } from '@angular/router';
import { filter, map, startWith } from 'rxjs';
import { mdiMagnify } from '@mdi/js';
import { Icon } from '../../ui/icon/icon';

/** Leads to the gallery with the words in its address. */
@Component({
  selector: 'app-search-field',
  imports: [Icon],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form role="search" action="/" method="get" (submit)="search($event, words.value)">
      <label class="unseen" for="search-words" i18n>Search the gallery</label>
      <app-icon [path]="magnifier" />
      <input
        #words
        id="search-words"
        name="q"
        type="search"
        maxlength="100"
        autocomplete="off"
        enterkeyhint="search"
        i18n-placeholder
        placeholder="Taxon, place, person, structure…"
        [value]="current()"
      />
    </form>
  `,
  styles: `
    form {
      position: relative;
    }
    app-icon {
      position: absolute;
      inset: 0 auto 0 12px;
      margin: auto;
      color: var(--ink-soft);
      pointer-events: none;
    }
    input {
      width: 100%;
      height: 44px;
      padding: 0 12px 0 42px;
      font: inherit;
      color: var(--ink);
      background: var(--paper);
      border: 1px solid var(--line-strong);
      border-radius: 2px;
    }
    input::placeholder {
      color: var(--ink-soft);
      opacity: 1;
    }
  `,
})
export class SearchField {
  private readonly router = inject(Router);
  protected readonly magnifier = mdiMagnify;

  protected readonly current = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      startWith(null),
      map(() => this.router.parseUrl(this.router.url).queryParamMap.get('q') ?? ''),
    ),
    { initialValue: '' },
  );

  protected search(event: Event, words: string): void {
    event.preventDefault(); // without script the form itself leads there
    const q = words.trim();
    void this.router.navigate(['/'], { queryParams: q ? { q } : {} });
  }
}
