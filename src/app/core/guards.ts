import { inject } from '@angular/core';
import { Router, type CanMatchFn, type UrlSegment, type UrlTree } from '@angular/router';
import type { Role } from '@shared/permission/can';
import { map } from 'rxjs';
import { SessionStore } from './session-store';

/** Sends visitors to sign in, and back afterwards (`?then=`). The server decides again on every request. */
export const signedIn: CanMatchFn = (_route, segments) => {
  const session = inject(SessionStore);
  const elsewhere = toSignIn(inject(Router), segments);
  return session.restore().pipe(map(() => (session.user() ? true : elsewhere)));
};

/** For those with another role the page is not there. */
export function hasRole(role: Role): CanMatchFn {
  return (_route, segments) => {
    const session = inject(SessionStore);
    const elsewhere = toSignIn(inject(Router), segments);
    return session.restore().pipe(map(() => (session.user() ? session.has(role) : elsewhere)));
  };
}

function toSignIn(router: Router, segments: readonly UrlSegment[]): UrlTree {
  const then = router.currentNavigation()?.extractedUrl.toString() ?? `/${segments.join('/')}`;
  return router.createUrlTree(['/sign-in'], { queryParams: { then } });
}
