import * as z from 'zod/mini';
import { Grounds, Id, ImagePoint, PersonRef, positive } from './common.js';

/** How a picture's scale came about: shown one click away from every number. */
export const ScaleProvenance = z.discriminatedUnion('by', [
  z.strictObject({
    by: z.literal('calibration'),
    calibrationId: Id,
    rigName: z.string(),
    settingName: z.string(),
    calibratedAt: z.string(),
    graduations: z.number(),
    spanUm: z.number(),
    toleranceUm: z.number(),
    residualSdPx: z.nullable(z.number()),
    /** the two parts of the relative standard uncertainty */
    fitRelative: z.number(),
    referenceRelative: z.number(),
    /** the picture was reduced from the calibrated frame by this factor; 1 when it has the frame's size or is a crop */
    reducedBy: z.number(),
  }),
  z.strictObject({
    by: z.literal('reference'),
    objectId: z.nullable(z.string()),
    lengthUm: z.number(),
    toleranceUm: z.number(),
    a: ImagePoint,
    b: ImagePoint,
  }),
  z.strictObject({ by: z.literal('finger'), breadthMm: z.number(), own: z.boolean(), a: ImagePoint, b: ImagePoint }),
  z.strictObject({
    by: z.literal('optics'),
    pixelPitchUm: z.number(),
    magnification: z.number(),
    relay: z.number(),
    binning: z.number(),
  }),
  z.strictObject({ by: z.literal('nothing') }),
]);
export type ScaleProvenance = z.infer<typeof ScaleProvenance>;

/** One version of a picture's scale. The numbers are null when the grounds are `none`. */
export const ScaleView = z.strictObject({
  id: Id,
  grounds: Grounds,
  umPerPxX: z.nullable(z.number()),
  umPerPxY: z.nullable(z.number()),
  /** standard uncertainty as a fraction (k = 1) */
  relativeUncertainty: z.nullable(z.number()),
  provenance: ScaleProvenance,
  setBy: PersonRef,
  setAt: z.string(),
});
export type ScaleView = z.infer<typeof ScaleView>;

/**
 * Sets a picture's scale. `setting` takes the setting's newest valid calibration; when the picture's
 * size is not the calibrated frame's, `sizeAnswer` must say why, else 409 `reduced-or-cropped`.
 */
export const SetScale = z.discriminatedUnion('by', [
  z.strictObject({
    by: z.literal('setting'),
    settingId: Id,
    sizeAnswer: z.optional(z.enum(['reduced', 'cropped'])),
  }),
  z.strictObject({
    by: z.literal('reference'),
    a: ImagePoint,
    b: ImagePoint,
    /** an id of `KNOWN_OBJECTS`, or null for a length that the person states */
    objectId: z.nullable(z.string()),
    lengthUm: z.optional(positive),
    toleranceUm: z.optional(z.number().check(z.nonnegative(), z.maximum(1e9))),
  }),
  z.strictObject({ by: z.literal('finger'), a: ImagePoint, b: ImagePoint }),
  z.strictObject({
    by: z.literal('optics'),
    pixelPitchUm: positive,
    magnification: positive,
    relay: positive,
    binning: z.number().check(z.minimum(1), z.maximum(8)),
  }),
  z.strictObject({ by: z.literal('nothing') }),
]);
export type SetScale = z.infer<typeof SetScale>;
