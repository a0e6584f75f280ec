import { HttpClient } from '@angular/common/http';
import { computed, inject, Injectable, PLATFORM_ID, signal } from '@angular/core';
import { isPlatformServer } from '@angular/common';
import { catchError, map, of, shareReplay, tap, throwError, type Observable } from 'rxjs';
import type { Role } from '@shared/permission/can';
import { sessionRoutes, type Me, type Session, type SignIn } from '@shared/contracts/session';
import { toApiProblem } from './api-problem';

const NOBODY: Session = { user: null, demo: [] };

/** Who is signed in. On the server nobody ever is: pages rendered there are a visitor's. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly http = inject(HttpClient);
  private readonly onServer = isPlatformServer(inject(PLATFORM_ID));
  private readonly session = signal<Session>(NOBODY);

  readonly user = computed(() => this.session().user);
  /** the demo's people, only while the demo is on */
  readonly demo = computed(() => this.session().demo);

  private readonly restored = this.onServer ? of(undefined) : this.fetch().pipe(shareReplay(1));

  /**
   * Ends when it is known who is signed in. Asked once before the first page shows, which also brings the
   * XSRF cookie; guards wait for it. Without an answer one is a visitor.
   */
  restore(): Observable<void> {
    return this.restored;
  }

  signIn(body: SignIn): Observable<Session> {
    return this.http.post<Session>(sessionRoutes.signIn.path, body).pipe(
      tap((session) => this.session.set(session)),
      catchError((error: unknown) => throwError(() => toApiProblem(error))),
    );
  }

  /** After an invitation was accepted, the answer is a session already. */
  take(session: Session): void {
    this.session.set(session);
  }

  /** After the profile was saved. */
  takeUser(user: Me): void {
    this.session.update((session) => ({ ...session, user }));
  }

  signOut(): Observable<void> {
    return this.http.delete<void>(sessionRoutes.signOut.path).pipe(
      tap(() => this.session.update(({ demo }) => ({ user: null, demo }))),
      catchError((error: unknown) => throwError(() => toApiProblem(error))),
    );
  }

  has(role: Role): boolean {
    return this.user()?.role === role;
  }

  private fetch(): Observable<void> {
    return this.http.get<Session>(sessionRoutes.read.path, { transferCache: false }).pipe(
      tap((session) => this.session.set(session)),
      map(() => undefined),
      catchError(() => of(undefined)),
    );
  }
}
