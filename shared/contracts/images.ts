import * as z from 'zod/mini';
import { Grounds, Id, Licence, line, NameView, PersonRef, prose } from './common.js';
import { defineRoutes } from './route.js';
import { ScaleView, SetScale } from './scales.js';

export const LIGHTS = [
  'daylight',
  'flash',
  'lamp',
  'ultraviolet',
  'bright field',
  'dark field',
  'phase contrast',
  'unknown',
] as const;
export const Light = z.enum(LIGHTS);

/** `subject` is a picture of the find; `reference` a picture of a stage micrometer or ruler, not shown in the gallery. */
export const ImageRole = z.enum(['subject', 'reference']);

/** Why a file was refused at intake; the client words it. */
export const Refusal = z.strictObject({
  code: z.enum(['type-not-accepted', 'too-many-pixels', 'not-readable', 'took-too-long', 'intake-failed']),
  parameters: z.record(z.string(), z.union([z.string(), z.number()])),
});
export type Refusal = z.infer<typeof Refusal>;

/** What the file says of its own making. Place and serial numbers are not in here. */
export const Capture = z.strictObject({
  /** local date and time as the camera wrote it, `2025-11-03T10:42:00`; null where it did not */
  local: z.nullable(z.string()),
  /** `+01:00`; null where the camera did not say */
  offset: z.nullable(z.string()),
  camera: z.nullable(z.string()),
  lens: z.nullable(z.string()),
  focalLengthMm: z.nullable(z.number()),
  /** from the focal-plane tags or the 35 mm equivalent; good to 3 % at best */
  pixelPitchUm: z.nullable(z.number()),
});
export type Capture = z.infer<typeof Capture>;

/** The least that a tile needs: picture, size, placeholder, and the scale that its bar is drawn from. */
export const ImageTile = z.strictObject({
  id: Id,
  revision: z.number(),
  /** upright pixels of the original */
  width: z.number(),
  height: z.number(),
  altText: z.string(),
  /** three colours of the picture's own, left to right, `#rrggbb` */
  colours: z.array(z.string()),
  /** renditions are `/renditions/{id}~{revision}/{width}.webp` for each of these widths */
  renditionWidths: z.array(z.number()),
  scale: z.nullable(
    z.strictObject({ umPerPxX: z.number(), umPerPxY: z.number(), relativeUncertainty: z.number(), grounds: Grounds }),
  ),
});
export type ImageTile = z.infer<typeof ImageTile>;

/** A picture in the sorting tray. `image` is null until its renditions are made. */
export const TrayPicture = z.strictObject({
  id: Id,
  name: z.string(),
  bytes: z.number(),
  state: z.enum(['waiting', 'working', 'ready', 'refused']),
  refusal: z.nullable(Refusal),
  /** the same bytes were brought in before */
  sameAs: z.nullable(z.strictObject({ imageId: Id, name: z.string(), findNumber: z.nullable(z.string()) })),
  capture: z.nullable(Capture),
  /** the file carries a place; it is kept and shown to its owner alone */
  exactPlace: z.nullable(z.strictObject({ latitude: z.number(), longitude: z.number() })),
  role: ImageRole,
  light: Light,
  /** the rig's setting it was taken with; without a scale it waits for that setting's calibration */
  settingId: z.nullable(Id),
  image: z.nullable(ImageTile),
  uploadedAt: z.string(),
});
export type TrayPicture = z.infer<typeof TrayPicture>;

/** Everything the bench needs to show one picture. */
export const ImageView = z.strictObject({
  ...ImageTile.shape,
  title: z.string(),
  role: ImageRole,
  light: Light,
  licence: Licence,
  creditLine: z.string(),
  owner: PersonRef,
  bitDepth: z.number(),
  format: z.string(),
  sha256: z.string(),
  /** empty for those who may not have the original: file names give places away */
  originalName: z.string(),
  capture: Capture,
  settingId: z.nullable(Id),
  find: z.nullable(z.strictObject({ id: Id, number: z.string(), name: z.nullable(NameView), fruitBodies: z.number() })),
  preparation: z.nullable(z.strictObject({ id: Id, title: z.string() })),
  /** the current scale with where it comes from; null when nobody has set one yet */
  currentScale: z.nullable(ScaleView),
  /** pictures of the same preparation (or observation), in order, this one among them */
  siblings: z.array(Id),
  /** smallest distance that the optics of the setting tell apart at 550 nm, µm; null when the aperture is unknown */
  resolutionUm: z.nullable(z.number()),
  may: z.strictObject({ edit: z.boolean(), annotate: z.boolean() }),
});
export type ImageView = z.infer<typeof ImageView>;

export const EditImage = z.strictObject({
  title: z.optional(prose(120)),
  altText: z.optional(prose(400)),
  role: z.optional(ImageRole),
  light: z.optional(Light),
  licence: z.optional(Licence),
  creditLine: z.optional(line(120)),
  preparationId: z.optional(z.nullable(Id)),
  /**
   * the setting it was taken with, said before that is calibrated: calibrating then scales it. Refused with 409
   * `has-scale` once there is a scale, which only `setScale` changes.
   */
  settingId: z.optional(z.nullable(Id)),
});
export type EditImage = z.infer<typeof EditImage>;

export const PICTURE_FORMATS = ['jpeg', 'png'] as const;
/** A copy to carry away. `width` in pixels, at most the original's (and 8,000); left out, the original's. */
export const PictureQuery = z.strictObject({
  width: z.optional(z.coerce.number().check(z.int(), z.minimum(64), z.maximum(8000))),
  format: z._default(z.enum(PICTURE_FORMATS), 'jpeg'),
  bar: z._default(z.enum(['on', 'off']), 'on'),
});
export type PictureQuery = z.infer<typeof PictureQuery>;

const image = { on: 'image', param: 'imageId' } as const;
export const imageRoutes = defineRoutes({
  tray: {
    method: 'get',
    path: '/api/tray',
    on: 'site',
    param: null,
    action: 'site.contribute',
    response: z.array(TrayPicture),
  },
  read: { method: 'get', path: '/api/images/:imageId', ...image, action: 'image.read', response: ImageView },
  edit: {
    method: 'patch',
    path: '/api/images/:imageId',
    ...image,
    action: 'image.edit',
    body: EditImage,
    response: ImageView,
  },
  /** takes a picture out of the tray (only while it is in no find); its original goes when no other picture has it */
  discard: { method: 'delete', path: '/api/images/:imageId', ...image, action: 'image.edit' },
  /** takes up intake again after a failure */
  retry: { method: 'post', path: '/api/images/:imageId/retry', ...image, action: 'image.edit', response: TrayPicture },
  original: { method: 'get', path: '/api/images/:imageId/original', ...image, action: 'image.read-original' },
  picture: { method: 'get', path: '/api/images/:imageId/picture', ...image, action: 'image.read', query: PictureQuery },
  scales: {
    method: 'get',
    path: '/api/images/:imageId/scales',
    ...image,
    action: 'image.read',
    response: z.array(ScaleView),
  },
  setScale: {
    method: 'post',
    path: '/api/images/:imageId/scales',
    ...image,
    action: 'image.edit',
    body: SetScale,
    response: ImageView,
  },
});
