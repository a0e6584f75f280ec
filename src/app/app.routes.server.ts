import { RenderMode, type ServerRoute } from '@angular/ssr';

const inBrowserOnly = ['sign-in', 'invitation/:token', 'reset', 'reset/:token', 'desk', 'desk/**', 'images/:imageId', 'keep', 'keep/**'];

/** Public pages are rendered on the server; desk, bench and editors live in the browser alone. */
export const serverRoutes: ServerRoute[] = [
  { path: '', renderMode: RenderMode.Server },
  { path: 'finds/:findId', renderMode: RenderMode.Server },
  { path: 'taxa', renderMode: RenderMode.Server },
  { path: 'taxa/:taxonId', renderMode: RenderMode.Server },
  { path: 'about', renderMode: RenderMode.Server },
  ...inBrowserOnly.map((path): ServerRoute => ({ path, renderMode: RenderMode.Client })),
  { path: '**', renderMode: RenderMode.Server, status: 404 },
];
