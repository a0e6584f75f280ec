import type { Knex } from 'knex';
import type { CalibrationView, Mark } from '../../shared/contracts/rigs.js';
import type { output } from 'zod/v4/core';
import type { Database } from './database.js';

/** A calibration with the marks that it was fitted to. Rows are never changed: a better one is a new row. */
export interface Calibration extends CalibrationView {
  readonly createdBy: string;
}

interface NewCalibrationRow extends Calibration {
  readonly marks: readonly output<typeof Mark>[];
  readonly crossMarks: readonly output<typeof Mark>[] | null;
}

interface Row {
  id: string;
  setting_id: string;
  image_id: string;
  marks: string;
  cross_marks: string | null;
  spacing_um: number;
  tolerance_um: number;
  um_per_px_x: number;
  um_per_px_y: number;
  relative_uncertainty: number;
  fit_relative: number;
  reference_relative: number;
  residual_sd_px: number | null;
  graduations: number;
  span_um: number;
  frame_width: number;
  frame_height: number;
  valid_from: string;
  valid_until: string | null;
  created_by: string;
  created_at: string;
}

export class CalibrationTable {
  constructor(private readonly db: Database) {}

  /** of these settings, newest first */
  async ofSettings(settingIds: readonly string[]): Promise<Calibration[]> {
    const rows = await this.db
      .read<Row>('calibrations')
      .whereIn('setting_id', settingIds)
      .orderBy([
        { column: 'created_at', order: 'desc' },
        { column: 'id', order: 'desc' },
      ]);
    return rows.map(toCalibration);
  }

  /** the newest of a setting that holds at an instant; null when none does */
  async valid(settingId: string, at: string, knex: Knex = this.db.read): Promise<Calibration | null> {
    const row = await knex<Row>('calibrations')
      .where({ setting_id: settingId })
      .where('valid_from', '<=', at)
      .where((holds) => holds.whereNull('valid_until').orWhere('valid_until', '>', at))
      .orderBy([
        { column: 'created_at', order: 'desc' },
        { column: 'id', order: 'desc' },
      ])
      .first();
    return row ? toCalibration(row) : null;
  }

  async insert(calibration: NewCalibrationRow, trx: Knex.Transaction): Promise<void> {
    await trx<Row>('calibrations').insert({
      id: calibration.id,
      setting_id: calibration.settingId,
      image_id: calibration.imageId,
      marks: JSON.stringify(calibration.marks),
      cross_marks: calibration.crossMarks && JSON.stringify(calibration.crossMarks),
      spacing_um: calibration.spacingUm,
      tolerance_um: calibration.toleranceUm,
      um_per_px_x: calibration.umPerPxX,
      um_per_px_y: calibration.umPerPxY,
      relative_uncertainty: calibration.relativeUncertainty,
      fit_relative: calibration.fitRelative,
      reference_relative: calibration.referenceRelative,
      residual_sd_px: calibration.residualSdPx,
      graduations: calibration.graduations,
      span_um: calibration.spanUm,
      frame_width: calibration.frameWidth,
      frame_height: calibration.frameHeight,
      valid_from: calibration.validFrom,
      valid_until: calibration.validUntil,
      created_by: calibration.createdBy,
      created_at: calibration.createdAt,
    });
  }
}

/** Without who made it and without its marks, as the API answers. */
export function toCalibrationView({ createdBy: _, ...view }: Calibration): CalibrationView {
  return view;
}

function toCalibration(row: Row): Calibration {
  return {
    id: row.id,
    settingId: row.setting_id,
    imageId: row.image_id,
    umPerPxX: row.um_per_px_x,
    umPerPxY: row.um_per_px_y,
    relativeUncertainty: row.relative_uncertainty,
    fitRelative: row.fit_relative,
    referenceRelative: row.reference_relative,
    residualSdPx: row.residual_sd_px,
    graduations: row.graduations,
    spanUm: row.span_um,
    spacingUm: row.spacing_um,
    toleranceUm: row.tolerance_um,
    frameWidth: row.frame_width,
    frameHeight: row.frame_height,
    validFrom: row.valid_from,
    validUntil: row.valid_until,
    createdBy: row.created_by,
    createdAt: row.created_at,
  };
}
