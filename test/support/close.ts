import { expect } from 'vitest';

/** Expects a number within a relative tolerance, as certified values are stated; exact zero stays absolute. */
export function expectClose(actual: number | null | undefined, expected: number, relative: number): void {
  expect(actual).toBeTypeOf('number');
  const error = Math.abs((actual as number) - expected);
  const allowed = relative * (expected === 0 ? 1 : Math.abs(expected));
  expect(error, `${actual} should be ${expected} within ${relative} of it`).toBeLessThanOrEqual(allowed);
}

/** The code of the DomainError that a call throws; fails when it throws none. */
export function codeOf(call: () => unknown): string {
  try {
    call();
  } catch (error) {
    return (error as { code?: string }).code ?? `not a DomainError: ${String(error)}`;
  }
  return 'threw nothing';
}
