import * as z from 'zod/mini';
import { Grounds, Id, line, PersonRef } from './common.js';
import { defineRoutes } from './route.js';

/** Where an edge was taken: outer dark line, inner, middle of the wall. */
export const EdgeRule = z.enum(['outer', 'inner', 'middle']);

/** One measured body, by the picture's current scale. µm are null while the picture has no scale. */
export const BodyView = z.strictObject({
  noteId: Id,
  imageId: Id,
  grounds: Grounds,
  /** standard uncertainty of the picture's scale as a fraction; null without scale */
  scaleRelativeUncertainty: z.nullable(z.number()),
  lengthPx: z.nullable(z.number()),
  widthPx: z.nullable(z.number()),
  lengthUm: z.nullable(z.number()),
  widthUm: z.nullable(z.number()),
  /** standard uncertainties, µm */
  lengthU: z.nullable(z.number()),
  widthU: z.nullable(z.number()),
});
export type BodyView = z.infer<typeof BodyView>;

/** Repeated measurements of one structure of one preparation by one observer. */
export const SeriesView = z.strictObject({
  id: Id,
  findId: Id,
  structure: z.string(),
  preparation: z.nullable(z.strictObject({ id: Id, title: z.string() })),
  edgeRule: EdgeRule,
  /** null: not said, and it is said to be unknown */
  ornamentIncluded: z.nullable(z.boolean()),
  observer: PersonRef,
  bodies: z.array(BodyView),
  createdAt: z.string(),
  mayMeasure: z.boolean(),
});
export type SeriesView = z.infer<typeof SeriesView>;

/** Opens the observer's series of this structure on the picture's preparation, or makes it. */
export const OpenSeries = z.strictObject({
  structure: line(60),
  edgeRule: EdgeRule,
  ornamentIncluded: z.nullable(z.boolean()),
});
export type OpenSeries = z.infer<typeof OpenSeries>;

export const EditSeries = z.strictObject({
  edgeRule: z.optional(EdgeRule),
  ornamentIncluded: z.optional(z.nullable(z.boolean())),
});
export type EditSeries = z.infer<typeof EditSeries>;

export const seriesRoutes = defineRoutes({
  ofImage: {
    method: 'get',
    path: '/api/images/:imageId/series',
    on: 'image',
    param: 'imageId',
    action: 'image.read',
    response: z.array(SeriesView),
  },
  open: {
    method: 'post',
    path: '/api/images/:imageId/series',
    on: 'image',
    param: 'imageId',
    action: 'image.annotate',
    body: OpenSeries,
    response: SeriesView,
  },
  read: {
    method: 'get',
    path: '/api/series/:seriesId',
    on: 'series',
    param: 'seriesId',
    action: 'series.read',
    response: SeriesView,
  },
  edit: {
    method: 'patch',
    path: '/api/series/:seriesId',
    on: 'series',
    param: 'seriesId',
    action: 'series.measure',
    body: EditSeries,
    response: SeriesView,
  },
  csv: {
    method: 'get',
    path: '/api/series/:seriesId/values.csv',
    on: 'series',
    param: 'seriesId',
    action: 'series.read',
  },
});
