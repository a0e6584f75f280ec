import { inject } from '@angular/core';
import { Router, type CanMatchFn } from '@angular/router';
import type { Role } from '@shared/permission/can';
import { SessionStore } from './session-store';

/** Sends visitors to sign in, and back afterwards (`?then=`). The server decides again on every request. */
export const signedIn: CanMatchFn = (_route, segments) => {
  if (inject(SessionStore).user()) return true;
  const router = inject(Router);
  const then = router.currentNavigation()?.extractedUrl.toString() ?? `/${segments.join('/')}`;
  return router.createUrlTree(['/sign-in'], { queryParams: { then } });
};

/** For those with another role the page is not there. */
export function hasRole(role: Role): CanMatchFn {
  return (route, segments) => {
    const session = inject(SessionStore);
    return session.user() ? session.has(role) : signedIn(route, segments);
  };
}
