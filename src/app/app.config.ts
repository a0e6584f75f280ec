import { provideHttpClient, withFetch } from '@angular/common/http';
import {
  inject,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
  type ApplicationConfig,
} from '@angular/core';
import { provideClientHydration, withI18nSupport } from '@angular/platform-browser';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withRouterConfig,
} from '@angular/router';
import { routes } from './app.routes';
import { PageTitleStrategy } from './core/page-title';
import { SessionStore } from './core/session-store';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(
      routes,
      withComponentInputBinding(),
      // "Gallery" from far down in the gallery leads to its beginning.
      withRouterConfig({ onSameUrlNavigation: 'reload' }),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    provideHttpClient(withFetch()), // Angular's own XSRF-TOKEN cookie and X-XSRF-TOKEN header are on by default
    // No event replay: it needs an inline script, which the content security policy refuses.
    provideClientHydration(withI18nSupport()),
    provideAppInitializer(() => inject(SessionStore).restore()),
    { provide: TitleStrategy, useClass: PageTitleStrategy },
  ],
};
