import type { Knex } from 'knex';

/** What calibrations need of pictures: their evidence, and those that wait for a scale. */
export class EvidenceTable {
  /** upright size of an own picture whose intake is done; null for any other */
  async ownReady(
    imageId: string,
    ownerId: string,
    trx: Knex.Transaction,
  ): Promise<{ width: number; height: number } | null> {
    const row = (await trx('images')
      .where({ id: imageId, owner_id: ownerId, state: 'ready' })
      .whereNotNull('width')
      .whereNotNull('height')
      .first('width', 'height')) as { width: number; height: number } | undefined;
    return row ?? null;
  }

  async becomesReference(imageId: string, settingId: string, trx: Knex.Transaction): Promise<void> {
    await trx('images').where({ id: imageId }).update({ setting_id: settingId, role: 'reference' });
  }

  /** own ready pictures of the setting that nobody has given a scale, of exactly the calibrated frame's size */
  async waitingForScale(
    settingId: string,
    ownerId: string,
    frame: { width: number; height: number },
    trx: Knex.Transaction,
  ): Promise<string[]> {
    return (await trx('images')
      .where({ setting_id: settingId, owner_id: ownerId, state: 'ready', width: frame.width, height: frame.height })
      .whereNull('current_scale_id')
      .orderBy('id')
      .pluck('id')) as string[];
  }
}
