import type { ObservationKind, Sensitivity, Visibility } from './find-draft';

/** On what small things are found; any other words will do as well. */
export const SUBSTRATES: readonly string[] = [
  $localize`on a fallen log, soft rot`,
  $localize`under a fallen log`,
  $localize`on dead bark`,
  $localize`on living bark`,
  $localize`on moss`,
  $localize`in leaf litter`,
  $localize`on dung`,
  $localize`on wet card`,
  $localize`under a stone`,
  $localize`on a mushroom`,
  $localize`on soil`,
];

export const KIND_WORDS: Readonly<Record<ObservationKind, string>> = {
  'in the field': $localize`in the field`,
  'at the bench': $localize`at the bench`,
  revisit: $localize`revisit`,
  culture: $localize`culture`,
};

/** How far the place is blurred for others; the distances are those of a degree's places near 54° N. */
export const SENSITIVITY_WORDS: Readonly<Record<Sensitivity, { readonly title: string; readonly means: string }>> = {
  none: { title: $localize`Not sensitive`, means: $localize`others see the coordinates as they are` },
  low: { title: $localize`Low`, means: $localize`others see the place to about 100 m` },
  medium: { title: $localize`Medium`, means: $localize`others see the place to about 1 km` },
  high: { title: $localize`High`, means: $localize`others see the place to about 10 km` },
  extreme: { title: $localize`Extreme`, means: $localize`others see no coordinates at all` },
};

export const VISIBILITY_WORDS: Readonly<Record<Visibility, { readonly title: string; readonly means: string }>> = {
  private: { title: $localize`Private`, means: $localize`only you` },
  group: { title: $localize`Group`, means: $localize`everybody who is signed in` },
  public: { title: $localize`Public`, means: $localize`everybody, in the gallery` },
  held: { title: $localize`Held until a date`, means: $localize`only you, and from that day on everybody` },
};
