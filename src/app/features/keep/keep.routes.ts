import type { Routes } from '@angular/router';

export const keepRoutes: Routes = [
  {
    path: '',
    title: $localize`Keeper's desk`,
    loadComponent: async () => (await import('./keep')).Keep,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'people' },
      { path: 'people', loadComponent: async () => (await import('./people')).People },
      { path: 'mail', loadComponent: async () => (await import('./mail')).Mail },
      { path: 'jobs', loadComponent: async () => (await import('./jobs')).Jobs },
      { path: 'originals', loadComponent: async () => (await import('./originals')).Originals },
    ],
  },
];
