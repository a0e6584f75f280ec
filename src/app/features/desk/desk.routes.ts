import type { Routes } from '@angular/router';

export const deskRoutes: Routes = [
  { path: '', pathMatch: 'full', title: $localize`My desk`, loadComponent: async () => (await import('./desk')).Desk },
  { path: 'tray', title: $localize`Sorting tray`, loadComponent: async () => (await import('./tray/tray')).Tray },
  { path: 'rigs', title: $localize`Rigs`, loadComponent: async () => (await import('./rigs/rigs')).Rigs },
  {
    path: 'rigs/:rigId/settings/:settingId/calibrate',
    title: $localize`Calibrate`,
    loadComponent: async () => (await import('./rigs/calibrate')).Calibrate,
  },
  { path: 'profile', title: $localize`Profile`, loadComponent: async () => (await import('./profile')).Profile },
];
