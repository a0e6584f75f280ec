import type { Routes } from '@angular/router';

export const accountRoutes: Routes = [
  { path: 'sign-in', title: $localize`Sign in`, loadComponent: async () => (await import('./sign-in')).SignIn },
  {
    path: 'invitation/:token',
    title: $localize`Invitation`,
    loadComponent: async () => (await import('./invitation')).Invitation,
  },
  {
    path: 'reset',
    title: $localize`Forgotten password`,
    loadComponent: async () => (await import('./ask-reset')).AskReset,
  },
  { path: 'reset/:token', title: $localize`New password`, loadComponent: async () => (await import('./reset')).Reset },
];
