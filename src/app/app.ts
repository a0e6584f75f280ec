import { Location } from '@angular/common';
import { afterNextRender, ChangeDetectionStrategy, Component, DOCUMENT, effect, inject, Injector } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import {
  NavigationEnd,
  NavigationError,
  Router,
  RouterOutlet,
  type ActivatedRouteSnapshot,
  type Data,
  type Routes,
} from '@angular/router';
import { filter, map, skip, startWith } from 'rxjs';
import { Footer } from './core/shell/footer';
import { Header } from './core/shell/header';

/** The frame of every page. In the dark room there is no frame. */
@Component({
  selector: 'app-root',
  imports: [RouterOutlet, Header, Footer],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './app.html',
  styleUrl: './app.scss',
})
export class App {
  private readonly router = inject(Router);
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);

  /** Until the first page's script is there the address alone tells, so that no light goes on before the bench. */
  private readonly first = dataBegunWith(this.router.config, inject(Location).path());

  protected readonly darkRoom = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      startWith(null),
      map(
        (arrived) => (arrived ? deepest(this.router.routerState.snapshot.root).data : this.first)['darkRoom'] === true,
      ),
    ),
    { initialValue: false },
  );

  /**
   * Where the script of the page that was asked for did not come: the connection is gone, or a newer Motebook has taken
   * its place. Its address, to be loaded whole; null once another page is there.
   */
  protected readonly unfetched = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationError || event instanceof NavigationEnd),
      map((event) => (event instanceof NavigationError ? event.url : null)),
    ),
    { initialValue: null },
  );

  constructor() {
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        skip(1),
        takeUntilDestroyed(),
      )
      .subscribe(() => afterNextRender(() => this.keepKeyboard(), { injector: this.injector }));
    // On the root element, so that menus and dialogs, which hang on the body, are dark too.
    effect(() => this.document.documentElement.classList.toggle('dark-room', this.darkRoom()));
  }

  /** What led to a page is often gone with the page before: the keyboard then begins with the content. */
  private keepKeyboard(): void {
    if (this.document.activeElement === this.document.body) {
      this.document.getElementById('content')?.focus({ preventScroll: true });
    }
  }

  /** By hand: with `<base href="/">` a bare `#content` would lead to the gallery. */
  protected skipToContent(event: Event): void {
    event.preventDefault();
    this.document.getElementById('content')?.focus();
  }
}

/** Data of the route whose path begins with the address's first part. */
function dataBegunWith(routes: Routes, address: string): Data {
  const part = address.split(/[/?#]/)[1];
  return routes.find(({ path }) => path?.split('/')[0] === part)?.data ?? {};
}

function deepest(route: ActivatedRouteSnapshot): ActivatedRouteSnapshot {
  return route.firstChild ? deepest(route.firstChild) : route;
}
