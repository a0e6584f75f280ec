const NO_BREAK_SPACE = '\u00A0';

interface Coordinates {
  readonly latitude: number | null;
  readonly longitude: number | null;
}

/** "within 1.3 km", to two digits and never less than it is; null where the radius is unknown. */
export function radiusWords(metres: number | null): string | null {
  if (metres === null) return null;
  const step = 10 ** Math.max(0, Math.floor(Math.log10(metres)) - 1);
  const rounded = Math.ceil(metres / step - 1e-9) * step;
  const size = rounded < 1000 ? `${rounded}${NO_BREAK_SPACE}m` : `${rounded / 1000}${NO_BREAK_SPACE}km`;
  return $localize`within ${size}`;
}

/** "54.2° N, 1.1° W", with as many digits as were given; null where there are none. */
export function coordinateWords({ latitude, longitude }: Coordinates): string | null {
  if (latitude === null || longitude === null) return null;
  const north = latitude < 0 ? $localize`S` : $localize`N`;
  const east = longitude < 0 ? $localize`W` : $localize`E`;
  return `${Math.abs(latitude)}°${NO_BREAK_SPACE}${north}, ${Math.abs(longitude)}°${NO_BREAK_SPACE}${east}`;
}

/** "within 1.3 km of 56.32° N, 2.9° E", or as much of it as is known. */
export function aroundWords(place: Coordinates & { readonly uncertaintyM: number | null }): string | null {
  const [radius, coordinates] = [radiusWords(place.uncertaintyM), coordinateWords(place)];
  return radius && coordinates ? $localize`${radius}:radius: of ${coordinates}:coordinates:` : (radius ?? coordinates);
}
