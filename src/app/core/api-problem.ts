import { HttpErrorResponse } from '@angular/common/http';
import { problemCode, type Problem } from '@shared/contracts/problems';

export interface FieldError {
  /** JSON Pointer into the request's body, `#/place/publicWords` */
  readonly pointer: string;
  readonly code: string;
  readonly detail: string;
}

/** What the server, or the way there, had against a request. `problem-words.ts` says it to people. */
export class ApiProblem extends Error {
  override readonly name = 'ApiProblem';

  constructor(
    readonly code: string,
    readonly status: number,
    readonly parameters: Readonly<Record<string, string | number>> = {},
    readonly fields: readonly FieldError[] = [],
    /** the request's number, to be told to the keeper when something broke */
    readonly instance: string | null = null,
  ) {
    super(code);
  }
}

/** `offline` where no answer came, `unexpected` where the answer was no problem document. */
export function toApiProblem(error: unknown): ApiProblem {
  if (error instanceof ApiProblem) return error;
  // A resource wraps what is not an Error; HttpErrorResponse is not one.
  if (error instanceof Error && error.cause !== undefined) return toApiProblem(error.cause);
  if (!(error instanceof HttpErrorResponse)) return new ApiProblem('unexpected', 0);
  if (error.status === 0) return new ApiProblem('offline', 0);
  const problem = parsed(error.error);
  return problem
    ? new ApiProblem(problemCode(problem), error.status, problem.parameters, problem.errors, problem.instance ?? null)
    : new ApiProblem(byStatus(error.status), error.status);
}

/** With `withFetch`, a body of `application/problem+json` arrives parsed or as text. */
function parsed(body: unknown): Problem | null {
  if (typeof body === 'string') {
    try {
      return parsed(JSON.parse(body));
    } catch {
      return null; // an HTML page of a proxy
    }
  }
  return typeof body === 'object' && body !== null && 'type' in body && typeof body.type === 'string'
    ? (body as Problem)
    : null;
}

function byStatus(status: number): string {
  if (status === 401) return 'not-signed-in';
  if (status === 403) return 'forbidden';
  if (status === 404) return 'not-found';
  if (status === 413) return 'too-large';
  if (status === 429 || status === 503) return 'busy';
  return 'unexpected';
}
