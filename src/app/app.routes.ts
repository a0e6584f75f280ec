import type { Routes } from '@angular/router';
import { hasRole, signedIn } from './core/guards';

/** `darkRoom` turns the lights off and takes the shell's header away, so that the picture leads. */
export const routes: Routes = [
  {
    path: '',
    pathMatch: 'full',
    loadComponent: async () => (await import('./features/gallery/gallery')).Gallery,
  },
  {
    path: 'finds/:findId',
    loadComponent: async () => (await import('./features/find/find')).Find,
  },
  {
    path: 'taxa',
    loadComponent: async () => (await import('./features/taxa/taxa')).Taxa,
  },
  {
    path: 'taxa/:taxonId',
    loadComponent: async () => (await import('./features/taxa/taxon')).Taxon,
  },
  {
    path: 'about',
    loadComponent: async () => (await import('./features/about/about')).About,
  },
  { path: '', loadChildren: async () => (await import('./features/account/account.routes')).accountRoutes },
  {
    path: 'desk',
    canMatch: [signedIn],
    loadChildren: async () => (await import('./features/desk/desk.routes')).deskRoutes,
  },
  {
    path: 'keep',
    canMatch: [hasRole('keeper')],
    loadChildren: async () => (await import('./features/keep/keep.routes')).keepRoutes,
  },
  {
    path: 'images/:imageId',
    title: $localize`Bench`,
    data: { darkRoom: true },
    loadComponent: async () => (await import('./features/bench/bench')).Bench,
  },
  {
    path: '**',
    title: $localize`Nothing here`,
    loadComponent: async () => (await import('./features/about/not-here')).NotHere,
  },
];
