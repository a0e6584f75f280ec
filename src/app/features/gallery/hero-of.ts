import type { GalleryTile } from '@shared/contracts/gallery';

/** As wide as it is hung on a common screen: anything smaller would be blown up. */
const LEAST_WIDTH_PX = 1200;
/** It is hung broad; a picture that stands upright would lose most of itself. */
const LEAST_ASPECT = 1.2;

/**
 * The picture that leads the gallery: the newest whose find has a name, that has a title of its own and a
 * scale, and that is large enough. Null where none is: an upload that nobody has looked at never leads.
 *
 * @param tiles newest first
 */
export function heroOf(tiles: readonly GalleryTile[]): GalleryTile | null {
  return (
    tiles.find(
      ({ name, title, scale, width, height }) =>
        name !== null &&
        title.trim() !== '' &&
        (scale?.grounds ?? 'none') !== 'none' &&
        width >= LEAST_WIDTH_PX &&
        width / height >= LEAST_ASPECT,
    ) ?? null
  );
}
