import { findRoutes } from './finds.js';
import { galleryRoutes } from './gallery.js';
import { imageRoutes } from './images.js';
import { keepRoutes } from './keep.js';
import { noteRoutes } from './notes.js';
import { rigRoutes } from './rigs.js';
import { seriesRoutes } from './series.js';
import { sessionRoutes } from './session.js';
import { taxonRoutes } from './taxa.js';

/** Every route of the API, by resource. A new resource is added here and is then in the permission table. */
export const ROUTES = {
  session: sessionRoutes,
  keep: keepRoutes,
  images: imageRoutes,
  rigs: rigRoutes,
  notes: noteRoutes,
  series: seriesRoutes,
  finds: findRoutes,
  taxa: taxonRoutes,
  gallery: galleryRoutes,
} as const;
