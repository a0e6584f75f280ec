import { galleryRoutes } from '../../shared/contracts/gallery.js';
import type { GalleryService } from '../services/gallery.js';
import type { Mount } from './mount.js';

export function mountGallery(mount: Mount, { gallery }: { gallery: GalleryService }): void {
  mount.route(galleryRoutes.page, ({ query }) => gallery.page(query));
}
