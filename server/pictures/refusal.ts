import type { Refusal } from '../../shared/contracts/images.js';

/** A picture that can't be taken in, and why; the client words it. */
export class Refused extends Error {
  override readonly name = 'Refused';

  constructor(
    readonly code: Refusal['code'],
    readonly parameters: Refusal['parameters'] = {},
  ) {
    super(`${code} ${JSON.stringify(parameters)}`);
  }
}
