const WORDS: Readonly<Record<string, string>> = {
  daylight: $localize`daylight`,
  flash: $localize`flash`,
  lamp: $localize`lamp`,
  ultraviolet: $localize`ultraviolet`,
  'bright field': $localize`bright field`,
  'dark field': $localize`dark field`,
  'phase contrast': $localize`phase contrast`,
  unknown: $localize`light not said`,
};

/** The light of a picture as people read it. */
export function lightWords(light: string): string {
  return WORDS[light] ?? light;
}
