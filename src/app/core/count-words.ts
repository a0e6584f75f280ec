/**
 * Counts as people read them. Here and not as plurals inside templates: those lose their place when a
 * page that the server rendered wakes up in the browser (Angular 21.2).
 */
export function pictureCount(n: number): string {
  if (n === 0) return $localize`no picture`;
  return n === 1 ? $localize`1 picture` : $localize`${n}:count: pictures`;
}

export function fruitBodyCount(n: number): string {
  return n === 1 ? $localize`1 fruit body` : $localize`${n}:count: fruit bodies`;
}
