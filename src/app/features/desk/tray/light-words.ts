import type { TrayPicture } from '@shared/contracts/images';

export const LIGHT_WORDS: Readonly<Record<TrayPicture['light'], string>> = {
  daylight: $localize`daylight`,
  flash: $localize`flash`,
  lamp: $localize`lamp`,
  ultraviolet: $localize`ultraviolet`,
  'bright field': $localize`bright field`,
  'dark field': $localize`dark field`,
  'phase contrast': $localize`phase contrast`,
  unknown: $localize`not said`,
};
