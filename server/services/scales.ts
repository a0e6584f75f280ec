import type { Knex } from 'knex';
import type { ScaleProvenance, ScaleView, SetScale } from '../../shared/contracts/scales.js';
import { fingerScale, UNKNOWN_FINGER } from '../../shared/scale/finger.js';
import { knownObject } from '../../shared/scale/known-objects.js';
import { opticsScale } from '../../shared/scale/optics-scale.js';
import { referenceScale } from '../../shared/scale/reference.js';
import { scaleAfterCrop, scaleAfterResize } from '../../shared/scale/resize.js';
import type { Scale } from '../../shared/scale/scale.js';
import { type Clock, instant } from '../clock.js';
import type { Calibration, CalibrationTable } from '../db/calibrations.js';
import type { Database } from '../db/database.js';
import type { ImageScale, ImageScaleTable } from '../db/image-scales.js';
import { type ImageTable, isReady, type ReadyImage } from '../db/images.js';
import type { Rig, RigTable, Setting } from '../db/rigs.js';
import type { User, UserTable } from '../db/users.js';
import { newId } from '../ids.js';
import { Conflict, Invalid, NotFound } from '../problem.js';

/** What a new scale changes elsewhere: measurements are reckoned anew, in the same transaction. */
export type OnNewScale = (trx: Knex.Transaction, imageId: string, scale: ImageScale) => Promise<void>;

/** A person measures their finger with a ruler once: its reading and print limit, mm. Common practice, no source. */
const FINGER_MEASURED_TO_MM = 0.5;

interface Found {
  readonly scale: Scale | null;
  readonly provenance: ScaleProvenance;
  readonly calibrationId: string | null;
  readonly settingId: string | null;
}

interface CalibratedBy {
  readonly calibration: Calibration;
  readonly setting: Setting;
  readonly rig: Rig;
}

export interface ScaleServiceOptions {
  readonly db: Database;
  readonly images: ImageTable;
  readonly scales: ImageScaleTable;
  readonly rigs: RigTable;
  readonly calibrations: CalibrationTable;
  readonly users: UserTable;
  readonly clock: Clock;
  readonly onNewScale: OnNewScale;
}

/** What one pixel of a picture means. Every change is a new version; the old ones stay. */
export class ScaleService {
  constructor(private readonly options: ScaleServiceOptions) {}

  /** all versions, newest first */
  history(imageId: string): Promise<ScaleView[]> {
    return this.options.scales.views(imageId);
  }

  /**
   * @throws {Conflict} `not-ready`; `no-calibration`; `reduced-or-cropped` when the picture has not the
   *   calibrated frame's size, upright or lying, and nobody has said why
   * @throws {NotFound} for a setting of somebody else's
   * @throws {Invalid} for ends outside the picture, an unknown object, an answer that can't be
   * @throws {DomainError} what the domain refuses of a reference
   */
  async set(personId: string, imageId: string, input: SetScale): Promise<void> {
    const { db, images, users } = this.options;
    const image = await images.find(imageId);
    const person = await users.find(personId);
    if (!image || !person) throw new NotFound('image');
    if (!isReady(image)) throw new Conflict('not-ready', 'The picture has not been taken in yet.');
    const found = await this.found(image, person, input);
    await db.write.transaction((trx) => this.append(trx, imageId, personId, found));
  }

  /** Gives a picture of exactly the calibrated frame's size the scale of a calibration. */
  readonly applyCalibration = async (
    trx: Knex.Transaction,
    imageId: string,
    by: CalibratedBy & { readonly userId: string },
  ): Promise<void> => {
    await this.append(trx, imageId, by.userId, calibrated(by, scaleOf(by.calibration), 1));
  };

  private async append(trx: Knex.Transaction, imageId: string, personId: string, found: Found): Promise<void> {
    const { scales, images, clock, onNewScale } = this.options;
    const { scale, provenance, calibrationId, settingId } = found;
    const version: ImageScale = {
      id: newId(),
      imageId,
      scale,
      provenance,
      calibrationId,
      setBy: personId,
      setAt: instant(clock),
    };
    await scales.insert(version, trx);
    await images.setScale(imageId, version.id, settingId, trx);
    await onNewScale(trx, imageId, version);
  }

  private async found(image: ReadyImage, person: User, input: SetScale): Promise<Found> {
    switch (input.by) {
      case 'setting':
        return this.bySetting(image, person, input);
      case 'reference':
        requireInside(image, input);
        return byReference(input);
      case 'finger':
        requireInside(image, input);
        return byFinger(input, person.fingertipMm);
      case 'optics': {
        const { pixelPitchUm, magnification, relay, binning } = input;
        const scale = opticsScale({ pixelPitchUm, magnification, relay, binning });
        return { scale, provenance: { by: 'optics', pixelPitchUm, magnification, relay, binning }, ...WITHOUT_SETTING };
      }
      case 'nothing':
        return { scale: null, provenance: { by: 'nothing' }, ...WITHOUT_SETTING };
    }
  }

  private async bySetting(
    image: ReadyImage,
    person: User,
    input: Extract<SetScale, { by: 'setting' }>,
  ): Promise<Found> {
    const { rigs, calibrations, clock } = this.options;
    const setting = await rigs.setting(input.settingId);
    const rig = setting && (await rigs.find(setting.rigId));
    if (!setting || rig?.ownerId !== person.id) throw new NotFound('setting');
    // a sitting's calibration also holds for what was photographed in it and brought in later
    const calibration =
      (await calibrations.valid(setting.id, instant(clock))) ??
      (await calibrations.valid(setting.id, captureInstant(image) ?? instant(clock)));
    if (!calibration)
      throw new Conflict('no-calibration', 'No calibration of this setting holds now.', { setting: setting.name });
    const { scale, reducedBy } = fitToSize(image, calibration, input.sizeAnswer);
    return calibrated({ calibration, setting, rig }, scale, reducedBy);
  }
}

const WITHOUT_SETTING = { calibrationId: null, settingId: null };

function calibrated({ calibration, setting, rig }: CalibratedBy, scale: Scale, reducedBy: number): Found {
  return {
    scale,
    calibrationId: calibration.id,
    settingId: setting.id,
    provenance: {
      by: 'calibration',
      calibrationId: calibration.id,
      rigName: rig.name,
      settingName: setting.name,
      calibratedAt: calibration.createdAt,
      graduations: calibration.graduations,
      spanUm: calibration.spanUm,
      toleranceUm: calibration.toleranceUm,
      residualSdPx: calibration.residualSdPx,
      fitRelative: calibration.fitRelative,
      referenceRelative: calibration.referenceRelative,
      reducedBy,
    },
  };
}

function scaleOf({ umPerPxX, umPerPxY, relativeUncertainty }: Calibration): Scale {
  return { umPerPxX, umPerPxY, relativeUncertainty, grounds: 'calibrated' };
}

/**
 * The calibrated scale for a picture of this size. A ratio alone proves nothing: a crop of half the size has
 * the size of a reduction to half, so a person must say which it is.
 */
function fitToSize(
  image: ReadyImage,
  calibration: Calibration,
  answer: 'reduced' | 'cropped' | undefined,
): { scale: Scale; reducedBy: number } {
  const { width, height } = image;
  const { frameWidth, frameHeight } = calibration;
  const scale = scaleOf(calibration);
  if (width === frameWidth && height === frameHeight) return { scale, reducedBy: 1 };
  // neither a crop nor a reduction is higher than the frame: the camera stood upright, or took itself to
  if (width === frameHeight && height === frameWidth) return { scale: turned(scale), reducedBy: 1 };
  const sizes = { width, height, frameWidth, frameHeight };
  if (answer === undefined) {
    throw new Conflict(
      'reduced-or-cropped',
      `Has ${width} × ${height} px, the frame ${frameWidth} × ${frameHeight}.`,
      sizes,
    );
  }
  if (answer === 'cropped') {
    if (width > frameWidth || height > frameHeight)
      throw impossible('larger-than-frame', 'A crop is not larger than its frame.');
    return { scale: scaleAfterCrop(scale), reducedBy: 1 };
  }
  // rounding to whole pixels may move either side by up to one
  const reducedBy = frameWidth / width;
  if (Math.abs(frameHeight / reducedBy - height) > 1 && Math.abs((frameWidth * height) / frameHeight - width) > 1) {
    throw impossible('other-aspect', 'A reduced picture has the proportions of its frame.');
  }
  if (reducedBy < 1) throw impossible('larger-than-frame', 'A reduced picture is not larger than its frame.');
  return { scale: scaleAfterResize(scale, frameWidth, width, frameHeight, height), reducedBy };
}

function turned(scale: Scale): Scale {
  return { ...scale, umPerPxX: scale.umPerPxY, umPerPxY: scale.umPerPxX };
}

function impossible(code: string, detail: string): Invalid {
  return new Invalid([{ pointer: '#/sizeAnswer', code, detail }]);
}

function byReference(input: Extract<SetScale, { by: 'reference' }>): Found {
  const { a, b, objectId } = input;
  const object = objectId === null ? null : knownObject(objectId);
  if (objectId !== null && !object) {
    throw new Invalid([
      { pointer: '#/objectId', code: 'unknown-object', detail: 'There is no such object of known size.' },
    ]);
  }
  const lengthUm = object?.lengthMm ? object.lengthMm * 1000 : input.lengthUm;
  const toleranceUm = object ? object.toleranceMm * 1000 : input.toleranceUm;
  if (lengthUm === undefined) throw missing('lengthUm', 'Needs the length between the two ends.');
  if (toleranceUm === undefined) throw missing('toleranceUm', 'Needs the limit to which that length is known.');
  return {
    scale: referenceScale({ a, b, lengthUm, toleranceUm }),
    provenance: { by: 'reference', objectId, lengthUm, toleranceUm, a, b },
    ...WITHOUT_SETTING,
  };
}

function missing(field: string, detail: string): Invalid {
  return new Invalid([{ pointer: `#/${field}`, code: 'missing', detail }]);
}

function byFinger({ a, b }: Extract<SetScale, { by: 'finger' }>, ownMm: number | null): Found {
  const own = ownMm === null ? null : { breadthMm: ownMm, measuredToMm: FINGER_MEASURED_TO_MM };
  return {
    scale: fingerScale({ a, b, own }),
    provenance: { by: 'finger', breadthMm: ownMm ?? UNKNOWN_FINGER.meanMm, own: ownMm !== null, a, b },
    ...WITHOUT_SETTING,
  };
}

type Ends = Pick<Extract<SetScale, { by: 'finger' }>, 'a' | 'b'>;

/** @throws {Invalid} beside each end that lies outside the picture */
function requireInside({ width, height }: ReadyImage, { a, b }: Ends): void {
  const errors = Object.entries({ a, b }).flatMap(([name, { x, y }]) =>
    x >= 0 && x <= width && y >= 0 && y <= height
      ? []
      : [{ pointer: `#/${name}`, code: 'outside-the-picture', detail: `The picture has ${width} × ${height} px.` }],
  );
  if (errors.length > 0) throw new Invalid(errors);
}

/** null where the camera did not say when, or in which zone */
function captureInstant({ capture: { local, offset } }: ReadyImage): string | null {
  return local === null || offset === null ? null : new Date(`${local}${offset}`).toISOString();
}
