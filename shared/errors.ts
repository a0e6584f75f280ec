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

/** @throws {DomainError} `not-positive` below zero and for infinities, `not-finite` for NaN */
export function requireNotNegative(value: number, name: string): void {
  if (Number.isNaN(value)) throw new DomainError('not-finite', `${name} must be a number.`, { name });
  if (!(value >= 0 && Number.isFinite(value))) {
    throw new DomainError('not-positive', `${name} must be zero or a positive number, was ${value}.`, { name });
  }
}

/** @throws {DomainError} `not-finite` when any of the values is NaN or infinite */
export function requireFinite(values: readonly number[], name: string): void {
  const bad = values.find((value) => !Number.isFinite(value));
  if (bad !== undefined) throw new DomainError('not-finite', `${name} must be finite, one was ${bad}.`, { name });
}
