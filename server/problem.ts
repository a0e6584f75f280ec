/**
 * Errors that a request can end in. `middleware/problems.ts` alone turns them into RFC 9457 answers;
 * broken rules of the domain (`shared/errors.ts`) become 422.
 */
export class HttpProblem extends Error {
  override readonly name = 'HttpProblem';

  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly parameters: Readonly<Record<string, string | number>> = {},
    readonly errors: readonly FieldError[] = [],
  ) {
    super(message);
  }
}

export interface FieldError {
  /** JSON Pointer into the request's body, `#/email` */
  readonly pointer: string;
  readonly code: string;
  readonly detail: string;
}

/** Also the answer to whatever the asker may not know of. */
export class NotFound extends HttpProblem {
  constructor(what: string) {
    super(404, 'not-found', `There is no such ${what}.`, { what });
  }
}

export class NotSignedIn extends HttpProblem {
  constructor() {
    super(401, 'not-signed-in', 'This needs a signed-in person.');
  }
}

export class Forbidden extends HttpProblem {
  constructor(action: string) {
    super(403, 'forbidden', `You may see this, but not do ${action}.`, { action });
  }
}

export class Conflict extends HttpProblem {
  constructor(code: string, message: string, parameters: Record<string, string | number> = {}) {
    super(409, code, message, parameters);
  }
}

/** There was no room to keep something: nothing of the request was done. */
export class DiskFull extends HttpProblem {
  constructor() {
    super(507, 'disk-full', 'There is no room to keep this.');
  }
}

/** Whether an error of the system or of SQLite says that the disk, or somebody's share of it, is full. */
export function isDiskFull(error: unknown): boolean {
  const code = typeof error === 'object' && error !== null && 'code' in error ? error.code : null;
  return code === 'ENOSPC' || code === 'EDQUOT' || code === 'SQLITE_FULL';
}

export class Invalid extends HttpProblem {
  constructor(errors: readonly FieldError[]) {
    super(422, 'invalid', errors.map((e) => `${e.pointer}: ${e.detail}`).join('; '), {}, errors);
  }
}
