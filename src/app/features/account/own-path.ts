/** A path of this site, or null: `?then=` is written by whoever made the link, and must not lead elsewhere. */
export function ownPath(then: string | undefined): string | null {
  return then !== undefined && /^\/(?![/\\])/.test(then) ? then : null;
}
