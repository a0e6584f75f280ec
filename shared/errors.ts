/**
 * A rule of the domain that the input broke.
 *
 * `code` is the stable name that HTTP problems and the client's wording build on
 * (`/problems/{code}`); `parameters` are the figures that the wording needs;
 * the message is for logs and scripts.
 */
export class DomainError extends Error {
  override readonly name = 'DomainError';

  constructor(
    readonly code: string,
    message: string,
    readonly parameters: Readonly<Record<string, string | number>> = {},
  ) {
    super(message);
  }
}

/** @throws {DomainError} `not-positive`, also for NaN and infinities */
export function requirePositive(value: number, name: string): void {
  if (!(value > 0 && Number.isFinite(value))) {
    throw new DomainError('not-positive', `${name} must be a positive number, was ${value}.`, { name });
  }
}
