import type { Licence } from '@shared/contracts/common';

/** A licence by the short name that its deed uses. */
export function licenceWords(licence: Licence): string {
  if (licence === 'cc0') return 'CC0 1.0';
  if (licence === 'all-rights-reserved') return $localize`All rights reserved`;
  return `CC ${licence.toUpperCase()} 4.0`;
}
