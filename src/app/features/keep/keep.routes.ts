import type { Routes } from '@angular/router';

export const keepRoutes: Routes = [
  { path: '', pathMatch: 'full', title: $localize`Keeper's desk`, loadComponent: async () => (await import('./keep')).Keep },
];
