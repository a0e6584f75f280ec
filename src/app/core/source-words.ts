/**
 * A source as a plot names it: its authors without initials, and the year.
 * @example shortSource('Macbride T.H. 1922 The North American Slime-Moulds', 1922) // 'Macbride 1922'
 */
export function shortSource(source: string, year: number | null): string {
  const beforeTitle = source.split(/\s*(?:[,(:]|\b\d{4}\b)/)[0] ?? source;
  const authors = beforeTitle.replace(/\s+(?:\p{Lu}\.-?)+/gu, '').trim() || source;
  return year === null ? $localize`${authors}:authors:, year unknown` : `${authors} ${year}`;
}

/** The whole source with its year, which it may state itself already. */
export function fullSource(source: string, year: number | null): string {
  if (!source) return year === null ? $localize`source and year unknown` : $localize`source unknown, ${year}:year:`;
  if (year === null) return $localize`${source}:source:, year unknown`;
  return source.includes(String(year)) ? source : `${source}, ${year}`;
}

/** Where in the source, with the dash of ranges: "264–265". */
export function pageWords(page: string): string {
  return page.replace(/(\d)\s*-\s*(?=\d)/g, '$1–') || $localize`unknown`;
}
