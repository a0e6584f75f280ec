import type { Knex } from 'knex';
import type { output } from 'zod/v4/core';
import type { Licence } from '../../shared/contracts/common.js';
import type { Capture, ImageRole, Light, Refusal } from '../../shared/contracts/images.js';
import type { PictureType } from '../pictures/file-type.js';
import type { Database } from './database.js';

export type ImageState = 'waiting' | 'working' | 'ready' | 'refused';

/** A picture: its original, what intake read of it, and what people said of it. */
export interface Image {
  readonly id: string;
  readonly ownerId: string;
  readonly observationId: string | null;
  readonly preparationId: string | null;
  readonly settingId: string | null;
  readonly state: ImageState;
  readonly refusal: Refusal | null;
  /** goes up whenever what is made from the original changes */
  readonly revision: number;
  readonly sha256: string;
  readonly originalName: string;
  readonly bytes: number;
  /** null, like the sizes, until intake has read them */
  readonly format: PictureType | null;
  /** upright px */
  readonly width: number | null;
  readonly height: number | null;
  readonly bitDepth: number | null;
  readonly role: output<typeof ImageRole>;
  readonly light: output<typeof Light>;
  readonly title: string;
  readonly altText: string;
  readonly licence: Licence;
  readonly creditLine: string;
  readonly capture: Capture;
  /** for the owner alone */
  readonly exactPlace: { readonly latitude: number; readonly longitude: number } | null;
  readonly colours: readonly string[];
  readonly renditionWidths: readonly number[];
  readonly currentScaleId: string | null;
  readonly uploadedAt: string;
}

/** A picture whose intake is done. */
export type ReadyImage = Image & {
  readonly width: number;
  readonly height: number;
  readonly bitDepth: number;
  readonly format: PictureType;
};

export function isReady(image: Image): image is ReadyImage {
  return image.state === 'ready';
}

export interface ImageRow {
  id: string;
  owner_id: string;
  observation_id: string | null;
  preparation_id: string | null;
  setting_id: string | null;
  state: ImageState;
  refusal: string | null;
  revision: number;
  sha256: string;
  original_name: string;
  bytes: number;
  format: PictureType | null;
  width: number | null;
  height: number | null;
  bit_depth: number | null;
  role: Image['role'];
  light: Image['light'];
  title: string;
  alt_text: string;
  licence: Licence;
  credit_line: string;
  captured_local: string | null;
  captured_offset: string | null;
  camera: string | null;
  lens: string | null;
  focal_length_mm: number | null;
  pixel_pitch_um: number | null;
  exact_latitude: number | null;
  exact_longitude: number | null;
  colours: string;
  rendition_widths: string;
  current_scale_id: string | null;
  uploaded_at: string;
}

/** What intake found out; written once it is done. */
export type Taken = Pick<
  Image,
  'format' | 'width' | 'height' | 'bitDepth' | 'capture' | 'exactPlace' | 'colours' | 'renditionWidths'
>;

export type ImageEdit = Partial<
  Pick<Image, 'title' | 'altText' | 'role' | 'light' | 'licence' | 'creditLine' | 'preparationId' | 'settingId'>
>;

export class ImageTable {
  constructor(private readonly db: Database) {}

  async find(id: string, knex: Knex = this.db.read): Promise<Image | null> {
    const row = await knex<ImageRow>('images').where({ id }).first();
    return row ? toImage(row) : null;
  }

  async insert(
    image: Pick<
      Image,
      'id' | 'ownerId' | 'sha256' | 'originalName' | 'bytes' | 'licence' | 'creditLine' | 'uploadedAt'
    >,
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx<ImageRow>('images').insert({
      id: image.id,
      owner_id: image.ownerId,
      state: 'waiting',
      sha256: image.sha256,
      original_name: image.originalName,
      bytes: image.bytes,
      licence: image.licence,
      credit_line: image.creditLine,
      uploaded_at: image.uploadedAt,
    });
  }

  /** pictures of a person that are in no find yet, oldest first */
  async tray(ownerId: string): Promise<Image[]> {
    const rows = await this.db
      .read<ImageRow>('images')
      .where({ owner_id: ownerId })
      .whereNull('observation_id')
      .orderBy(['uploaded_at', 'id']);
    return rows.map(toImage);
  }

  /** earlier pictures of the same owner with the same bytes, oldest first, with the number of their find */
  async sameBytes(
    images: readonly Image[],
  ): Promise<{ id: string; name: string; sha256: string; findNumber: string | null }[]> {
    const [first] = images;
    if (!first) return [];
    const rows = (await this.db
      .read('images')
      .leftJoin('observations', 'observations.id', 'images.observation_id')
      .leftJoin('finds', 'finds.id', 'observations.find_id')
      .where('images.owner_id', first.ownerId)
      .whereIn('images.sha256', [...new Set(images.map((image) => image.sha256))])
      .orderBy('images.id')
      .select('images.id', 'images.sha256', 'images.original_name', 'finds.prefix', 'finds.number')) as {
      id: string;
      sha256: string;
      original_name: string;
      prefix: string | null;
      number: number | null;
    }[];
    return rows.map((row) => ({
      id: row.id,
      name: row.original_name,
      sha256: row.sha256,
      findNumber: row.prefix === null ? null : `${row.prefix}-${row.number}`,
    }));
  }

  /** ready pictures that lie beside this one: of its preparation, or else of its observation, or else itself alone */
  async siblings(image: Image): Promise<string[]> {
    if (image.observationId === null) return [image.id];
    return (await this.db
      .read('images')
      .where({ state: 'ready', observation_id: image.observationId, preparation_id: image.preparationId })
      .orderByRaw('captured_local is null, captured_local, uploaded_at, id')
      .pluck('id')) as string[];
  }

  async setWorking(id: string): Promise<void> {
    await this.db
      .write<ImageRow>('images')
      .where({ id })
      .whereIn('state', ['waiting', 'refused'])
      .update({ state: 'working', refusal: null });
  }

  /** false when the picture has been discarded meanwhile */
  async setTaken(id: string, taken: Taken): Promise<boolean> {
    const changed = await this.db
      .write<ImageRow>('images')
      .where({ id })
      .update({
        state: 'ready',
        refusal: null,
        format: taken.format,
        width: taken.width,
        height: taken.height,
        bit_depth: taken.bitDepth,
        captured_local: taken.capture.local,
        captured_offset: taken.capture.offset,
        camera: taken.capture.camera,
        lens: taken.capture.lens,
        focal_length_mm: taken.capture.focalLengthMm,
        pixel_pitch_um: taken.capture.pixelPitchUm,
        exact_latitude: taken.exactPlace?.latitude ?? null,
        exact_longitude: taken.exactPlace?.longitude ?? null,
        colours: JSON.stringify(taken.colours),
        rendition_widths: JSON.stringify(taken.renditionWidths),
      });
    return changed === 1;
  }

  async setRefused(id: string, refusal: Refusal, knex: Knex = this.db.write): Promise<void> {
    await knex<ImageRow>('images')
      .where({ id })
      .whereNot({ state: 'ready' })
      .update({ state: 'refused', refusal: JSON.stringify(refusal) });
  }

  /** back to waiting for intake; false unless it had been refused */
  async setWaiting(id: string, trx: Knex.Transaction): Promise<boolean> {
    const changed = await trx<ImageRow>('images')
      .where({ id, state: 'refused' })
      .update({ state: 'waiting', refusal: null });
    return changed === 1;
  }

  async edit(id: string, edit: ImageEdit): Promise<void> {
    const columns: Partial<ImageRow> = {
      ...(edit.title !== undefined && { title: edit.title }),
      ...(edit.altText !== undefined && { alt_text: edit.altText }),
      ...(edit.role !== undefined && { role: edit.role }),
      ...(edit.light !== undefined && { light: edit.light }),
      ...(edit.licence !== undefined && { licence: edit.licence }),
      ...(edit.creditLine !== undefined && { credit_line: edit.creditLine }),
      ...(edit.preparationId !== undefined && { preparation_id: edit.preparationId }),
      ...(edit.settingId !== undefined && { setting_id: edit.settingId }),
    };
    if (Object.keys(columns).length > 0) await this.db.write<ImageRow>('images').where({ id }).update(columns);
  }

  async setScale(id: string, scaleId: string, settingId: string | null, trx: Knex.Transaction): Promise<void> {
    await trx<ImageRow>('images')
      .where({ id })
      .update({
        current_scale_id: scaleId,
        ...(settingId !== null && { setting_id: settingId }),
      });
  }

  async remove(id: string, trx: Knex.Transaction): Promise<void> {
    await trx<ImageRow>('images').where({ id }).delete();
  }

  async isEvidence(id: string, trx: Knex.Transaction): Promise<boolean> {
    return (await trx('calibrations').where({ image_id: id }).first('id')) !== undefined;
  }

  async hasOriginal(sha256: string): Promise<boolean> {
    return (await this.db.write<ImageRow>('images').where({ sha256 }).first('id')) !== undefined;
  }
}

export function toImage(row: ImageRow): Image {
  return {
    id: row.id,
    ownerId: row.owner_id,
    observationId: row.observation_id,
    preparationId: row.preparation_id,
    settingId: row.setting_id,
    state: row.state,
    refusal: row.refusal === null ? null : (JSON.parse(row.refusal) as Refusal),
    revision: row.revision,
    sha256: row.sha256,
    originalName: row.original_name,
    bytes: row.bytes,
    format: row.format,
    width: row.width,
    height: row.height,
    bitDepth: row.bit_depth,
    role: row.role,
    light: row.light,
    title: row.title,
    altText: row.alt_text,
    licence: row.licence,
    creditLine: row.credit_line,
    capture: {
      local: row.captured_local,
      offset: row.captured_offset,
      camera: row.camera,
      lens: row.lens,
      focalLengthMm: row.focal_length_mm,
      pixelPitchUm: row.pixel_pitch_um,
    },
    exactPlace:
      row.exact_latitude === null || row.exact_longitude === null
        ? null
        : { latitude: row.exact_latitude, longitude: row.exact_longitude },
    colours: JSON.parse(row.colours) as string[],
    renditionWidths: JSON.parse(row.rendition_widths) as number[],
    currentScaleId: row.current_scale_id,
    uploadedAt: row.uploaded_at,
  };
}
