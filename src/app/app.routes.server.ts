import { RenderMode, type ServerRoute } from '@angular/ssr';
import { BROWSER_PAGES, PUBLIC_PAGES } from '@shared/pages';

/** Public pages are rendered on the server; desk, bench and editors live in the browser alone. */
export const serverRoutes: ServerRoute[] = [
  ...PUBLIC_PAGES.map((path): ServerRoute => ({ path, renderMode: RenderMode.Server })),
  ...BROWSER_PAGES.map((path): ServerRoute => ({ path, renderMode: RenderMode.Client })),
  { path: '**', renderMode: RenderMode.Server, status: 404 },
];
