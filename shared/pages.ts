/**
 * The pages that a person can visit, as both sides must know them: the browser's router shows them, the server
 * answers 404 to everything else. `:name` stands for one part of the path, `**` for anything below.
 */

/** Rendered on the server for signed-out visitors. */
export const PUBLIC_PAGES = ['', 'finds/:findId', 'taxa', 'taxa/:taxonId', 'about'] as const;

/** Live in the browser alone: account, desk, bench, keeper's desk. */
export const BROWSER_PAGES = [
  'sign-in',
  'invitation/:token',
  'reset',
  'reset/:token',
  'desk',
  'desk/**',
  'images/:imageId',
  'keep',
  'keep/**',
] as const;

/** @param path  of a URL, with its leading slash, without query */
export function isPage(path: string, pages: readonly string[]): boolean {
  const parts = path.split('/').slice(1);
  return pages.some((page) => {
    const wanted = page.split('/');
    const open = wanted.at(-1) === '**';
    if (open ? parts.length < wanted.length : parts.length !== wanted.length) return false;
    return wanted.every((part, i) => part === '**' || (part.startsWith(':') ? parts[i] !== '' : part === parts[i]));
  });
}
