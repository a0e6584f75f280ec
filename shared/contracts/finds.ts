import * as z from 'zod/mini';
import { SENSITIVITIES } from '../place/generalise.js';
import { Day, Id, Licence, line, NameView, PersonRef, prose, Visibility } from './common.js';
import { ImageRole, ImageTile, Light } from './images.js';
import { defineRoutes } from './route.js';
import { SeriesView } from './series.js';

export const OBSERVATION_KINDS = ['in the field', 'at the bench', 'revisit', 'culture'] as const;
export const ObservationKind = z.enum(OBSERVATION_KINDS);

/** How far the public place is generalised: Chapman 2020, categories 1–4, or none. */
export { SENSITIVITIES };
export const Sensitivity = z.enum(SENSITIVITIES);

/** The exact place: for the finder and those named. Its words never become public by themselves. */
export const ExactPlace = z.strictObject({
  words: prose(200),
  latitude: z.nullable(z.number().check(z.minimum(-90), z.maximum(90))),
  longitude: z.nullable(z.number().check(z.minimum(-180), z.maximum(180))),
  /** metres; zero is not valid, null is unknown (Darwin Core, coordinateUncertaintyInMeters) */
  uncertaintyM: z.nullable(z.number().check(z.positive())),
});
export type ExactPlace = z.infer<typeof ExactPlace>;

/** What everybody sees: own words, and coordinates generalised by the sensitivity. */
export const PublicPlace = z.strictObject({
  words: z.string(),
  latitude: z.nullable(z.number()),
  longitude: z.nullable(z.number()),
  uncertaintyM: z.nullable(z.number()),
});
export type PublicPlace = z.infer<typeof PublicPlace>;

export const NewObservation = z.strictObject({
  kind: ObservationKind,
  observedOn: Day,
  substrate: prose(120),
  remarks: prose(2000),
});
export type NewObservation = z.infer<typeof NewObservation>;

export const PlaceInput = z.strictObject({ exact: ExactPlace, publicWords: prose(120), sensitivity: Sensitivity });
export type PlaceInput = z.infer<typeof PlaceInput>;

export const NewFind = z.strictObject({
  imageIds: z.array(Id).check(z.maxLength(200)),
  observation: NewObservation,
  place: PlaceInput,
  visibility: Visibility,
  heldUntil: z.nullable(Day),
});
export type NewFind = z.infer<typeof NewFind>;

export const EditFind = z.strictObject({
  visibility: z.optional(Visibility),
  heldUntil: z.optional(z.nullable(Day)),
  place: z.optional(PlaceInput),
  /** fruit bodies that the find's spores came from, for the notation's [a/b/c] */
  fruitBodies: z.optional(z.number().check(z.int(), z.minimum(1), z.maximum(999))),
});
export type EditFind = z.infer<typeof EditFind>;

export const AddObservation = z.strictObject({
  ...NewObservation.shape,
  imageIds: z.array(Id).check(z.maxLength(200)),
});
export type AddObservation = z.infer<typeof AddObservation>;
export const EditObservation = z.partial(NewObservation);
export type EditObservation = z.infer<typeof EditObservation>;

/** What lies on the slide or under the lens. */
export const NewPreparation = z.strictObject({
  observationId: Id,
  title: line(60),
  part: prose(60),
  medium: prose(60),
  stain: prose(60),
  condition: z.enum(['fresh', 'dried', 'revived', 'unknown']),
  imageIds: z.array(Id).check(z.maxLength(200)),
});
export type NewPreparation = z.infer<typeof NewPreparation>;

export const PreparationView = z.strictObject({
  id: Id,
  title: z.string(),
  part: z.string(),
  medium: z.string(),
  stain: z.string(),
  condition: z.string(),
});
export type PreparationView = z.infer<typeof PreparationView>;

export const FindPicture = z.strictObject({
  ...ImageTile.shape,
  title: z.string(),
  role: ImageRole,
  light: Light,
  preparationId: z.nullable(Id),
  creditLine: z.string(),
  licence: Licence,
});
export type FindPicture = z.infer<typeof FindPicture>;

export const ObservationView = z.strictObject({
  id: Id,
  kind: ObservationKind,
  observedOn: z.string(),
  observer: PersonRef,
  substrate: z.string(),
  remarks: z.string(),
  preparations: z.array(PreparationView),
  pictures: z.array(FindPicture),
});
export type ObservationView = z.infer<typeof ObservationView>;

export const QUALIFIERS = ['', 'cf.', 'aff.', 'sp.', 'indet.', 'agg.', '?'] as const;
export const CONFIDENCES = ['certain', 'fairly sure', 'a guess'] as const;

/** A name given to the find, with reasons. `taxonId` null: a name that the list of taxa does not hold. */
export const NewDetermination = z.strictObject({
  taxonId: Id,
  qualifier: z.enum(QUALIFIERS),
  reason: line(2000),
  confidence: z.enum(CONFIDENCES),
});
export type NewDetermination = z.infer<typeof NewDetermination>;

export const DeterminationView = z.strictObject({
  id: Id,
  taxonId: Id,
  /** as given, whatever became of the taxon since */
  name: NameView,
  reason: z.string(),
  confidence: z.enum(CONFIDENCES),
  by: PersonRef,
  determinedAt: z.string(),
  stands: z.boolean(),
});
export type DeterminationView = z.infer<typeof DeterminationView>;

/** A printed size that a series can be held against. */
export const PublishedSizeView = z.strictObject({
  id: Id,
  taxonId: Id,
  taxonName: z.string(),
  structure: z.string(),
  dimension: z.enum(['length', 'width']),
  minUm: z.number(),
  maxUm: z.number(),
  source: z.string(),
  year: z.nullable(z.number()),
  page: z.string(),
  seen: z.boolean(),
});
export type PublishedSizeView = z.infer<typeof PublishedSizeView>;

export const FindView = z.strictObject({
  id: Id,
  number: z.string(),
  owner: PersonRef,
  visibility: Visibility,
  heldUntil: z.nullable(z.string()),
  fruitBodies: z.number(),
  publicPlace: PublicPlace,
  /** null for all but the finder and those named */
  exactPlace: z.nullable(ExactPlace),
  sensitivity: Sensitivity,
  placeReaders: z.array(PersonRef),
  observations: z.array(ObservationView),
  determinations: z.array(DeterminationView),
  standing: z.nullable(DeterminationView),
  series: z.array(SeriesView),
  publishedSizes: z.array(PublishedSizeView),
  may: z.strictObject({ edit: z.boolean(), determine: z.boolean(), decide: z.boolean() }),
});
export type FindView = z.infer<typeof FindView>;

/** One line of the own finds on the desk. */
export const FindRow = z.strictObject({
  id: Id,
  number: z.string(),
  name: z.nullable(NameView),
  visibility: Visibility,
  observedOn: z.string(),
  publicWords: z.string(),
  pictures: z.number(),
  cover: z.nullable(ImageTile),
});
export type FindRow = z.infer<typeof FindRow>;

const find = { on: 'find', param: 'findId' } as const;
export const findRoutes = defineRoutes({
  mine: {
    method: 'get',
    path: '/api/finds',
    on: 'site',
    param: null,
    action: 'site.contribute',
    response: z.array(FindRow),
  },
  make: {
    method: 'post',
    path: '/api/finds',
    on: 'site',
    param: null,
    action: 'site.contribute',
    body: NewFind,
    response: FindView,
  },
  read: { method: 'get', path: '/api/finds/:findId', ...find, action: 'find.read', response: FindView },
  edit: {
    method: 'patch',
    path: '/api/finds/:findId',
    ...find,
    action: 'find.edit',
    body: EditFind,
    response: FindView,
  },
  addObservation: {
    method: 'post',
    path: '/api/finds/:findId/observations',
    ...find,
    action: 'find.edit',
    body: AddObservation,
    response: FindView,
  },
  editObservation: {
    method: 'patch',
    path: '/api/finds/:findId/observations/:observationId',
    ...find,
    action: 'find.edit',
    body: EditObservation,
    response: FindView,
  },
  addPreparation: {
    method: 'post',
    path: '/api/finds/:findId/preparations',
    ...find,
    action: 'find.edit',
    body: NewPreparation,
    response: FindView,
  },
  determine: {
    method: 'post',
    path: '/api/finds/:findId/determinations',
    ...find,
    action: 'find.determine',
    body: NewDetermination,
    response: FindView,
  },
  decide: {
    method: 'put',
    path: '/api/finds/:findId/standing/:determinationId',
    ...find,
    action: 'find.decide',
    response: FindView,
  },
});
