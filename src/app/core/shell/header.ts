import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatMenuModule } from '@angular/material/menu';
import { toSignal } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive } from '@angular/router';
import { filter, map, startWith } from 'rxjs';
import { mdiAccountOutline, mdiCircleHalfFull, mdiMenu } from '@mdi/js';
import { Icon } from '../../ui/icon/icon';
import { Mark } from '../../ui/mark/mark';
import { SessionStore } from '../session-store';
import { THEMES, ThemeStore, type Theme } from '../theme-store';
import { SearchField } from './search-field';

/** The top line: quiet, and only what exists. */
@Component({
  selector: 'app-header',
  imports: [RouterLink, RouterLinkActive, MatButtonModule, MatMenuModule, Icon, Mark, SearchField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './header.html',
  styleUrl: './header.scss',
})
export class Header {
  private readonly session = inject(SessionStore);
  private readonly themes = inject(ThemeStore);
  private readonly router = inject(Router);

  protected readonly icons = {
    account: mdiAccountOutline,
    menu: mdiMenu,
    theme: mdiCircleHalfFull,
  };
  protected readonly user = this.session.user;
  protected readonly theme = this.themes.theme;
  protected readonly themeChoices: readonly { readonly theme: Theme; readonly words: string }[] = THEMES.map(
    (theme) => ({
      theme,
      words: { auto: $localize`As the system has it`, light: $localize`Light`, dark: $localize`Dark` }[theme],
    }),
  );

  /** Signing in leads back to where one was; from the gallery and the sign-in itself, to the desk. */
  protected readonly then = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      startWith(null),
      map(() => (/^\/(finds|taxa)\b/.test(this.router.url) ? { then: this.router.url } : {})),
    ),
    { initialValue: {} },
  );

  protected choose(theme: Theme): void {
    this.themes.choose(theme);
  }

  protected signOut(): void {
    // Whatever became of the request, the next page is the gallery; a session that stayed shows itself there.
    const leave = () => void this.router.navigateByUrl('/');
    this.session.signOut().subscribe({ next: leave, error: leave });
  }
}
