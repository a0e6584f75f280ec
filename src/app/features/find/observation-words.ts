import type { OBSERVATION_KINDS } from '@shared/contracts/finds';

const KINDS: Readonly<Record<(typeof OBSERVATION_KINDS)[number], string>> = {
  'in the field': $localize`in the field`,
  'at the bench': $localize`at the bench`,
  revisit: $localize`revisit`,
  culture: $localize`culture`,
};

export function kindWords(kind: (typeof OBSERVATION_KINDS)[number]): string {
  return KINDS[kind];
}

export const CONDITIONS = ['unknown', 'fresh', 'dried', 'revived'] as const;
const CONDITION_WORDS: Readonly<Record<(typeof CONDITIONS)[number], string>> = {
  fresh: $localize`fresh`,
  dried: $localize`dried`,
  revived: $localize`revived`,
  unknown: $localize`state not said`,
};

export function conditionWords(condition: string): string {
  const known = CONDITIONS.find((each) => each === condition);
  return known ? CONDITION_WORDS[known] : condition;
}
