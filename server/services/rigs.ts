import type { Knex } from 'knex';
import type {
  CalibrationKept,
  NewCalibration,
  NewRig,
  NewSetting,
  RigView,
  SettingView,
} from '../../shared/contracts/rigs.js';
import { type Clock, instant } from '../clock.js';
import { type Calibration, type CalibrationTable, toCalibrationView } from '../db/calibrations.js';
import type { Database } from '../db/database.js';
import type { EvidenceTable } from '../db/evidence.js';
import type { Rig, RigTable, Setting } from '../db/rigs.js';
import { newId } from '../ids.js';
import { Invalid, NotFound } from '../problem.js';
import { fitMarks, requireInside } from './calibrations.js';

/**
 * A calibration of optics that are put together anew each time lapses after this, ms: longer than anybody
 * sits at the bench in one go, shorter than until the next day. Common practice, no source.
 */
const SITTING_MS = 12 * 60 * 60 * 1000;

/** Gives a picture the scale of a calibration, as a new version; see `services/scales.ts`. */
export type ApplyCalibration = (
  trx: Knex.Transaction,
  imageId: string,
  by: { readonly calibration: Calibration; readonly setting: Setting; readonly rig: Rig; readonly userId: string },
) => Promise<void>;

/** Rigs, their settings, and how many micrometres a pixel covers at each. */
export class RigService {
  constructor(
    private readonly db: Database,
    private readonly rigs: RigTable,
    private readonly calibrations: CalibrationTable,
    private readonly evidence: EvidenceTable,
    private readonly applyCalibration: ApplyCalibration,
    private readonly clock: Clock,
  ) {}

  async list(ownerId: string): Promise<RigView[]> {
    return this.views(await this.rigs.ofOwner(ownerId));
  }

  async read(rigId: string): Promise<RigView> {
    const [view] = await this.views([await this.rig(rigId)]);
    return view as RigView;
  }

  async add(ownerId: string, rig: NewRig): Promise<RigView> {
    const id = newId();
    await this.rigs.insertRig({ ...rig, id, ownerId, createdAt: instant(this.clock) });
    return this.read(id);
  }

  async addSetting(rigId: string, setting: NewSetting): Promise<SettingView> {
    const id = newId();
    await this.rigs.insertSetting({ ...setting, id, rigId, createdAt: instant(this.clock) });
    return this.settingView(await this.setting(rigId, id));
  }

  /**
   * Keeps a calibration. Its evidence picture takes this setting and scale and becomes a picture of
   * reference; pictures of the setting that wait for a scale, and have the calibrated frame's size, are scaled.
   *
   * @throws {Invalid} `not-your-picture` unless the evidence is the person's own and ready; marks outside it
   * @throws {DomainError} what the fit refuses
   */
  async calibrate(actorId: string, rigId: string, settingId: string, input: NewCalibration): Promise<CalibrationKept> {
    const rig = await this.rig(rigId);
    const setting = await this.setting(rigId, settingId);
    const now = this.clock.now();
    return this.db.write.transaction(async (trx) => {
      const picture = await this.evidence.ownReady(input.imageId, actorId, trx);
      if (!picture) {
        throw new Invalid([
          { pointer: '#/imageId', code: 'not-your-picture', detail: 'Needs an own picture that is ready.' },
        ]);
      }
      requireInside(input, picture);
      const calibration: Calibration = {
        id: newId(),
        settingId,
        imageId: input.imageId,
        ...fitMarks(input),
        spacingUm: input.spacingUm,
        toleranceUm: input.toleranceUm,
        frameWidth: picture.width,
        frameHeight: picture.height,
        validFrom: now.toISOString(),
        validUntil: setting.oneSitting ? new Date(now.getTime() + SITTING_MS).toISOString() : null,
        createdBy: actorId,
        createdAt: now.toISOString(),
      };
      await this.calibrations.insert({ ...calibration, marks: input.marks, crossMarks: input.crossMarks ?? null }, trx);
      const by = { calibration, setting, rig, userId: actorId };
      await this.evidence.becomesReference(input.imageId, settingId, trx);
      await this.applyCalibration(trx, input.imageId, by);
      const waiting = await this.evidence.waitingForScale(settingId, actorId, picture, trx);
      for (const imageId of waiting) await this.applyCalibration(trx, imageId, by);
      return { calibration: toCalibrationView(calibration), scaledImages: waiting.length };
    });
  }

  private async rig(id: string): Promise<Rig> {
    const rig = await this.rigs.find(id);
    if (!rig) throw new NotFound('rig');
    return rig;
  }

  /** @throws {NotFound} also for a setting of another rig */
  private async setting(rigId: string, id: string): Promise<Setting> {
    const setting = await this.rigs.setting(id);
    if (setting?.rigId !== rigId) throw new NotFound('setting');
    return setting;
  }

  private async views(rigs: readonly Rig[]): Promise<RigView[]> {
    const settings = await this.settingViews(await this.rigs.settings(rigs.map((rig) => rig.id)));
    return rigs.map((rig) => ({
      id: rig.id,
      name: rig.name,
      camera: rig.camera,
      remarks: rig.remarks,
      settings: settings.filter((setting) => setting.rigId === rig.id),
    }));
  }

  private async settingView(setting: Setting): Promise<SettingView> {
    return (await this.settingViews([setting]))[0] as SettingView;
  }

  private async settingViews(settings: readonly Setting[]): Promise<SettingView[]> {
    const ids = settings.map((setting) => setting.id);
    const all = await this.calibrations.ofSettings(ids);
    const uses = await this.rigs.uses(ids);
    const now = instant(this.clock);
    return settings.map((setting) => {
      const history = all.filter((calibration) => calibration.settingId === setting.id).map(toCalibrationView);
      const holds = history.find(
        ({ validFrom, validUntil }) => validFrom <= now && (validUntil === null || validUntil > now),
      );
      return { ...setting, calibration: holds ?? null, history, uses: uses.get(setting.id) ?? 0 };
    });
  }
}
