import { defineRoutes } from './route.js';

/**
 * Pictures as pages fetch them. What a name with `~{revision}` answers never changes; IIIF Image API 3 also has
 * the stable name, which answers the current revision.
 */
const image = { method: 'get', on: 'image', param: 'imageId', action: 'image.read' } as const;
export const deliveryRoutes = defineRoutes({
  /** `file` is `{width}.webp` */
  rendition: { ...image, path: '/renditions/:imageId~:revision/:file' },
  iiifInfoOfRevision: { ...image, path: '/iiif/:imageId~:revision/info.json' },
  iiifImageOfRevision: { ...image, path: '/iiif/:imageId~:revision/:region/:size/:rotation/:file' },
  iiifBaseOfRevision: { ...image, path: '/iiif/:imageId~:revision' },
  iiifInfo: { ...image, path: '/iiif/:imageId/info.json' },
  iiifImage: { ...image, path: '/iiif/:imageId/:region/:size/:rotation/:file' },
  iiifBase: { ...image, path: '/iiif/:imageId' },
});
