import * as z from 'zod/mini';
import { Id, line, NameView, prose } from './common.js';
import { PublishedSizeView } from './finds.js';
import { GalleryTile } from './gallery.js';
import { defineRoutes } from './route.js';

export const RANKS = ['kingdom', 'phylum', 'class', 'order', 'family', 'genus', 'species', 'variety'] as const;

/** One name of the list, as the picker searches it. */
export const TaxonName = z.strictObject({
  id: Id,
  name: z.string(),
  authorship: z.string(),
  rank: z.enum(RANKS),
  code: z.enum(['botanical', 'zoological']),
  /** set for a synonym: the accepted name's id */
  acceptedId: z.nullable(Id),
  parentId: z.nullable(Id),
  /** public pictures of finds that carry it, its own and those below it */
  pictures: z.number(),
});
export type TaxonName = z.infer<typeof TaxonName>;

export const TaxonView = z.strictObject({
  id: Id,
  name: NameView,
  /** from the highest down to the parent */
  above: z.array(z.strictObject({ id: Id, name: NameView })),
  below: z.array(z.strictObject({ id: Id, name: NameView, pictures: z.number() })),
  synonyms: z.array(NameView),
  accepted: z.nullable(z.strictObject({ id: Id, name: NameView })),
  publishedSizes: z.array(PublishedSizeView),
  pictures: z.array(GalleryTile),
});
export type TaxonView = z.infer<typeof TaxonView>;

export const NewTaxon = z.strictObject({
  name: line(120),
  authorship: prose(120),
  rank: z.enum(RANKS),
  code: z.enum(['botanical', 'zoological']),
  parentId: z.nullable(Id),
});
export type NewTaxon = z.infer<typeof NewTaxon>;

export const taxonRoutes = defineRoutes({
  names: {
    method: 'get',
    path: '/api/taxa',
    on: 'site',
    param: null,
    action: 'site.read',
    response: z.array(TaxonName),
  },
  read: {
    method: 'get',
    path: '/api/taxa/:taxonId',
    on: 'site',
    param: null,
    action: 'site.read',
    response: TaxonView,
  },
  add: {
    method: 'post',
    path: '/api/taxa',
    on: 'site',
    param: null,
    action: 'taxa.add',
    body: NewTaxon,
    response: TaxonName,
  },
});
