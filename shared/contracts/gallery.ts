import * as z from 'zod/mini';
import { Id, Licence, NameView } from './common.js';
import { ImageTile } from './images.js';
import { defineRoutes } from './route.js';

export const GalleryTile = z.strictObject({
  ...ImageTile.shape,
  title: z.string(),
  light: z.string(),
  findId: Id,
  findNumber: z.string(),
  taxonId: z.nullable(Id),
  name: z.nullable(NameView),
  publicPlace: z.string(),
  creditLine: z.string(),
  licence: Licence,
});
export type GalleryTile = z.infer<typeof GalleryTile>;

export const GalleryQuery = z.strictObject({
  /** a taxon and everything below it */
  taxon: z.optional(Id),
  /** words: names, synonyms, public place, person, structures, substrate */
  q: z.optional(z.string().check(z.trim(), z.maxLength(100))),
  /** where to go on: the last answer's `next` */
  after: z.optional(z.string().check(z.maxLength(200))),
  limit: z._default(z.coerce.number().check(z.int(), z.minimum(1), z.maximum(60)), 24),
});
export type GalleryQuery = z.infer<typeof GalleryQuery>;

export const GalleryPage = z.strictObject({
  tiles: z.array(GalleryTile),
  total: z.number(),
  next: z.nullable(z.string()),
});
export type GalleryPage = z.infer<typeof GalleryPage>;

export const galleryRoutes = defineRoutes({
  page: {
    method: 'get',
    path: '/api/gallery',
    on: 'site',
    param: null,
    action: 'site.read',
    query: GalleryQuery,
    response: GalleryPage,
  },
});
