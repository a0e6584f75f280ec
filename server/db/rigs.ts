import type { Knex } from 'knex';
import type { NewRig, NewSetting } from '../../shared/contracts/rigs.js';
import type { Database } from './database.js';

export interface Rig {
  readonly id: string;
  readonly ownerId: string;
  readonly name: string;
  readonly camera: string;
  readonly remarks: string;
}

/** One combination of a rig, with one scale. */
export interface Setting {
  readonly id: string;
  readonly rigId: string;
  readonly name: string;
  readonly objective: string;
  readonly magnification: number | null;
  readonly numericalAperture: number | null;
  readonly oneSitting: boolean;
  readonly captureMode: string;
}

interface RigRow {
  id: string;
  owner_id: string;
  name: string;
  camera: string;
  remarks: string;
  created_at: string;
}

interface SettingRow {
  id: string;
  rig_id: string;
  name: string;
  objective: string;
  magnification: number | null;
  numerical_aperture: number | null;
  one_sitting: number;
  capture_mode: string;
  created_at: string;
}

/** Rigs and their settings. */
export class RigTable {
  constructor(private readonly db: Database) {}

  async ofOwner(ownerId: string): Promise<Rig[]> {
    const rows = await this.db.read<RigRow>('rigs').where({ owner_id: ownerId }).orderBy(['created_at', 'id']);
    return rows.map(toRig);
  }

  async find(id: string): Promise<Rig | null> {
    const row = await this.db.read<RigRow>('rigs').where({ id }).first();
    return row ? toRig(row) : null;
  }

  async settings(rigIds: readonly string[]): Promise<Setting[]> {
    const rows = await this.db.read<SettingRow>('settings').whereIn('rig_id', rigIds).orderBy(['created_at', 'id']);
    return rows.map(toSetting);
  }

  async setting(id: string, knex: Knex = this.db.read): Promise<Setting | null> {
    const row = await knex<SettingRow>('settings').where({ id }).first();
    return row ? toSetting(row) : null;
  }

  /** how many pictures carry a scale of each setting, by setting */
  async uses(settingIds: readonly string[]): Promise<Map<string, number>> {
    const rows = (await this.db
      .read('images')
      .join('image_scales', 'image_scales.id', 'images.current_scale_id')
      .join('calibrations', 'calibrations.id', 'image_scales.calibration_id')
      .whereIn('calibrations.setting_id', settingIds)
      .groupBy('calibrations.setting_id')
      .select('calibrations.setting_id')
      .count({ pictures: '*' })) as { setting_id: string; pictures: number }[];
    return new Map(rows.map((row) => [row.setting_id, row.pictures]));
  }

  async insertRig(rig: NewRig & { id: string; ownerId: string; createdAt: string }): Promise<void> {
    await this.db.write<RigRow>('rigs').insert({
      id: rig.id,
      owner_id: rig.ownerId,
      name: rig.name,
      camera: rig.camera,
      remarks: rig.remarks,
      created_at: rig.createdAt,
    });
  }

  async insertSetting(setting: NewSetting & { id: string; rigId: string; createdAt: string }): Promise<void> {
    await this.db.write('settings').insert({
      id: setting.id,
      rig_id: setting.rigId,
      name: setting.name,
      objective: setting.objective,
      magnification: setting.magnification,
      numerical_aperture: setting.numericalAperture,
      one_sitting: setting.oneSitting,
      capture_mode: setting.captureMode,
      created_at: setting.createdAt,
    });
  }
}

function toRig(row: RigRow): Rig {
  return { id: row.id, ownerId: row.owner_id, name: row.name, camera: row.camera, remarks: row.remarks };
}

function toSetting(row: SettingRow): Setting {
  return {
    id: row.id,
    rigId: row.rig_id,
    name: row.name,
    objective: row.objective,
    magnification: row.magnification,
    numericalAperture: row.numerical_aperture,
    oneSitting: Boolean(row.one_sitting),
    captureMode: row.capture_mode,
  };
}
