import * as z from 'zod/mini';
import { Id, ImagePoint, line, positive, prose } from './common.js';
import { defineRoutes } from './route.js';

/** A dated measurement of how many µm one pixel covers at a setting. Immutable. */
export const CalibrationView = z.strictObject({
  id: Id,
  settingId: Id,
  imageId: Id,
  umPerPxX: z.number(),
  umPerPxY: z.number(),
  /** standard uncertainty as a fraction (k = 1), fit and micrometer together */
  relativeUncertainty: z.number(),
  fitRelative: z.number(),
  referenceRelative: z.number(),
  residualSdPx: z.nullable(z.number()),
  graduations: z.number(),
  spanUm: z.number(),
  spacingUm: z.number(),
  toleranceUm: z.number(),
  frameWidth: z.number(),
  frameHeight: z.number(),
  validFrom: z.string(),
  /** for a sitting: when it lapses; null while it holds */
  validUntil: z.nullable(z.string()),
  createdAt: z.string(),
});
export type CalibrationView = z.infer<typeof CalibrationView>;

export const SettingView = z.strictObject({
  id: Id,
  rigId: Id,
  name: z.string(),
  objective: z.string(),
  magnification: z.nullable(z.number()),
  numericalAperture: z.nullable(z.number()),
  /** put together anew each time: a calibration holds for one sitting */
  oneSitting: z.boolean(),
  captureMode: z.string(),
  /** the newest that holds now; null when there is none */
  calibration: z.nullable(CalibrationView),
  /** all of them, newest first */
  history: z.array(CalibrationView),
  /** pictures that carry a scale of this setting */
  uses: z.number(),
});
export type SettingView = z.infer<typeof SettingView>;

export const RigView = z.strictObject({
  id: Id,
  name: z.string(),
  camera: z.string(),
  remarks: z.string(),
  settings: z.array(SettingView),
});
export type RigView = z.infer<typeof RigView>;

export const NewRig = z.strictObject({ name: line(80), camera: prose(80), remarks: prose(400) });
export type NewRig = z.infer<typeof NewRig>;

export const NewSetting = z.strictObject({
  name: line(80),
  objective: prose(80),
  magnification: z.nullable(positive),
  numericalAperture: z.nullable(z.number().check(z.positive(), z.maximum(1.7))),
  oneSitting: z.boolean(),
  captureMode: prose(80),
});
export type NewSetting = z.infer<typeof NewSetting>;

/** A marked graduation: where it lies, and which one it is, counted in spacings from any first. */
export const Mark = z.strictObject({
  at: ImagePoint,
  index: z.number().check(z.int(), z.minimum(-10000), z.maximum(10000)),
});
export type Mark = z.infer<typeof Mark>;

export const NewCalibration = z.strictObject({
  imageId: Id,
  /** along one ruling */
  marks: z.array(Mark).check(z.minLength(2), z.maxLength(500)),
  /** along a second ruling across the first, for pixels that are not square; left out, x and y are taken as equal */
  crossMarks: z.optional(z.array(Mark).check(z.minLength(2), z.maxLength(500))),
  spacingUm: positive,
  /** the micrometer's limit of error between any two marks, µm, ± */
  toleranceUm: z.number().check(z.nonnegative(), z.maximum(1000)),
});
export type NewCalibration = z.infer<typeof NewCalibration>;

/** What keeping it did: how many waiting pictures of the setting now carry it. */
export const CalibrationKept = z.strictObject({ calibration: CalibrationView, scaledImages: z.number() });
export type CalibrationKept = z.infer<typeof CalibrationKept>;

export const rigRoutes = defineRoutes({
  list: {
    method: 'get',
    path: '/api/rigs',
    on: 'site',
    param: null,
    action: 'site.contribute',
    response: z.array(RigView),
  },
  add: {
    method: 'post',
    path: '/api/rigs',
    on: 'site',
    param: null,
    action: 'site.contribute',
    body: NewRig,
    response: RigView,
  },
  read: { method: 'get', path: '/api/rigs/:rigId', on: 'rig', param: 'rigId', action: 'rig.read', response: RigView },
  addSetting: {
    method: 'post',
    path: '/api/rigs/:rigId/settings',
    on: 'rig',
    param: 'rigId',
    action: 'rig.edit',
    body: NewSetting,
    response: SettingView,
  },
  calibrate: {
    method: 'post',
    path: '/api/rigs/:rigId/settings/:settingId/calibrations',
    on: 'rig',
    param: 'rigId',
    action: 'rig.edit',
    body: NewCalibration,
    response: CalibrationKept,
  },
});
