/**
 * What a carried-away picture is called: `CW-214-hemitrichia-clavata-1600.jpg`.
 * A picture without find or name is called by its title, or else by its file.
 */
export function pictureName(input: {
  readonly findNumber: string | null;
  readonly taxon: string | null;
  readonly title: string;
  readonly originalName: string;
  readonly width: number;
  readonly format: 'jpeg' | 'png';
}): string {
  const { findNumber, taxon, title, originalName, width, format } = input;
  const words =
    slug(taxon ?? '') || slug(title) || (findNumber ? '' : slug(originalName.replace(/\.[^.]*$/, '')) || 'picture');
  return `${[findNumber, words, width].filter((part) => part !== null && part !== '').join('-')}.${format === 'jpeg' ? 'jpg' : 'png'}`;
}

function slug(text: string): string {
  return text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
}
