import type { NameView } from '@shared/contracts/common';
import { plainName } from '@shared/taxonomy/name';

/** A name in plain text without its authors, for titles. */
export function nameWords(name: NameView): string {
  return plainName({ ...name, authorship: null });
}
