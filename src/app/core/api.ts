import { HttpClient, httpResource, type HttpResourceRef } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { RouteContract } from '@shared/contracts/route';
import type { input, output, $ZodType } from 'zod/v4/core';
import { catchError, throwError, type Observable } from 'rxjs';
import { toApiProblem } from './api-problem';
import { SessionStore } from './session-store';

type ParamName<Path extends string> = Path extends `${string}:${infer Rest}`
  ? Rest extends `${infer Name}/${infer More}`
    ? Name | ParamName<`/${More}`>
    : Rest
  : never;

/** What a route wants to be told: the ids in its path, its body, its query; only what its contract has. */
export type CallOf<R extends RouteContract> = ([ParamName<R['path']>] extends [never]
  ? unknown
  : { readonly params: Readonly<Record<ParamName<R['path']>, string>> }) &
  (R extends { readonly body: infer B extends $ZodType } ? { readonly body: input<B> } : unknown) &
  (R extends { readonly query: infer Q extends $ZodType } ? { readonly query?: Partial<input<Q>> } : unknown);

/** What a route answers; nothing where its contract states no response. */
export type AnswerOf<R extends RouteContract> = R extends { readonly response: infer A extends $ZodType }
  ? output<A>
  : void;

/** The one way to the server: it takes a route's contract and what the contract asks for. */
@Injectable({ providedIn: 'root' })
export class Api {
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);

  /** Errors arrive as `ApiProblem`. */
  call<R extends RouteContract>(route: R, call: CallOf<R>): Observable<AnswerOf<R>> {
    const { body, query } = call as Loose;
    return this.http
      .request<AnswerOf<R>>(route.method, pathOf(route, call), {
        ...(body === undefined ? {} : { body }),
        params: presentOnly(query),
        ...this.transfer(),
      })
      .pipe(catchError((error: unknown) => throwError(() => toApiProblem(error))));
  }

  /**
   * A value that follows its request: asked anew when the request or the person signed in changes.
   * On a page that the server rendered it is there from the first moment on.
   *
   * @param request returns undefined while there is nothing to ask
   */
  resource<R extends RouteContract>(
    route: R,
    request: () => CallOf<R> | undefined,
  ): HttpResourceRef<AnswerOf<R> | undefined> {
    return httpResource<AnswerOf<R>>(() => {
      const call = request();
      if (call === undefined) return undefined;
      return { url: pathOf(route, call), params: presentOnly((call as Loose).query), ...this.transfer() };
    });
  }

  /** What the server rendered is a visitor's view; somebody signed in asks for their own. */
  private transfer(): { transferCache?: false } {
    return this.session.user() ? { transferCache: false } : {};
  }
}

interface Loose {
  readonly params?: Readonly<Record<string, string>>;
  readonly body?: unknown;
  readonly query?: Readonly<Record<string, unknown>>;
}

/** The address of a route, its parameters filled in; also for links to files. */
export function pathOf<R extends RouteContract>(route: R, call: CallOf<R>): string {
  const { params = {} } = call as Loose;
  return route.path.replace(/:(\w+)/g, (_, name: string) => encodeURIComponent(params[name] ?? ''));
}

function presentOnly(query: Readonly<Record<string, unknown>> = {}): Record<string, string> {
  return Object.fromEntries(
    Object.entries(query).flatMap(([name, value]) =>
      value === undefined || value === null || value === '' ? [] : [[name, String(value)]],
    ),
  );
}
