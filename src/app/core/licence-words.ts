import type { Licence } from '@shared/contracts/common';

/** What others may do with a picture, in plain words. */
export const LICENCE_WORDS: Readonly<Record<Licence, { readonly title: string; readonly means: string }>> = {
  cc0: { title: 'CC0', means: $localize`anybody may use it for anything, without naming you` },
  by: { title: 'CC BY', means: $localize`anybody may use and change it, if they name you` },
  'by-sa': { title: 'CC BY-SA', means: $localize`as CC BY, and what they make of it carries the same licence` },
  'by-nc': { title: 'CC BY-NC', means: $localize`as CC BY, but not to earn money` },
  'by-nc-sa': { title: 'CC BY-NC-SA', means: $localize`not to earn money; the same licence on what they make of it` },
  'by-nd': { title: 'CC BY-ND', means: $localize`anybody may pass it on unchanged, if they name you` },
  'by-nc-nd': { title: 'CC BY-NC-ND', means: $localize`pass it on unchanged, name you, earn no money` },
  'all-rights-reserved': {
    title: $localize`All rights kept`,
    means: $localize`shown here; for anything else they must ask you`,
  },
};

/** A licence by the short name that its deed uses. */
export function licenceWords(licence: Licence): string {
  if (licence === 'cc0') return 'CC0 1.0';
  if (licence === 'all-rights-reserved') return $localize`All rights reserved`;
  return `CC ${licence.toUpperCase()} 4.0`;
}
