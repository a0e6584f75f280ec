import { mkdir } from 'node:fs/promises';
import { dirname } from 'node:path';
import type { Knex } from 'knex';
import sharp from 'sharp';
import { newId } from '../../server/ids.js';
import { PictureFiles } from '../../server/pictures/picture-files.js';
import type { Visibility } from '../../shared/permission/can.js';
import type { TestApp } from './app.js';

type Owner = { readonly id: string };

export interface FindOptions {
  readonly visibility?: Visibility;
  /** UTC date */
  readonly heldUntil?: string | null;
  readonly publicWords?: string;
  readonly exactWords?: string;
  readonly latitude?: number;
  readonly longitude?: number;
}

export interface ImageOptions {
  /** null: in the sorting tray */
  readonly observationId?: string | null;
  readonly preparationId?: string | null;
  readonly settingId?: string | null;
  readonly state?: 'waiting' | 'working' | 'ready' | 'refused';
  readonly sha256?: string;
  readonly originalName?: string;
  readonly width?: number;
  readonly height?: number;
  readonly role?: 'subject' | 'reference';
}

interface PictureRow {
  readonly id: string;
  readonly revision: number;
  readonly sha256: string;
  readonly width: number;
  readonly height: number;
}

/**
 * Puts things straight into the tables, without the routes: for tests that need a thing to be there and ask
 * something else. Each method answers the new thing's id.
 */
export class World {
  constructor(private readonly server: Pick<TestApp, 'db' | 'clock' | 'config'>) {}

  async find(owner: Owner, options: FindOptions = {}): Promise<string> {
    return this.insert('finds', {
      prefix: 'CW',
      number: await this.nextNumber(),
      owner_id: owner.id,
      visibility: options.visibility ?? 'private',
      held_until: options.heldUntil ?? null,
      sensitivity: 'none',
      exact_words: options.exactWords ?? 'behind the third sleeper',
      exact_latitude: options.latitude ?? null,
      exact_longitude: options.longitude ?? null,
      public_words: options.publicWords ?? 'the old depot',
      created_at: this.now(),
    });
  }

  async placeReader(findId: string, reader: Owner): Promise<void> {
    await this.knex('find_place_readers').insert({ find_id: findId, user_id: reader.id });
  }

  async observation(findId: string, observer: Owner): Promise<string> {
    return this.insert('observations', {
      find_id: findId,
      kind: 'in the field',
      observed_on: '2026-02-14',
      observer_id: observer.id,
      substrate: 'rotten ash',
      remarks: '',
      created_at: this.now(),
    });
  }

  async preparation(observationId: string, title = 'slide 1'): Promise<string> {
    const prepared = { part: 'gills', medium: 'water', stain: '', condition: 'fresh' };
    return this.insert('preparations', { observation_id: observationId, title, ...prepared, created_at: this.now() });
  }

  async image(owner: Owner, options: ImageOptions = {}): Promise<string> {
    return this.insert('images', {
      owner_id: owner.id,
      observation_id: options.observationId ?? null,
      preparation_id: options.preparationId ?? null,
      setting_id: options.settingId ?? null,
      state: options.state ?? 'ready',
      sha256: options.sha256 ?? newId().replaceAll('-', '').padEnd(64, '0'),
      original_name: options.originalName ?? 'DSC_0001.JPG',
      bytes: 1000,
      format: 'jpeg',
      width: options.width ?? 1200,
      height: options.height ?? 800,
      bit_depth: 8,
      role: options.role ?? 'subject',
      licence: 'by',
      credit_line: 'A photographer',
      colours: '["#6b5a3c","#a84a24","#f7f3ea"]',
      rendition_widths: '[400]',
      uploaded_at: this.now(),
    });
  }

  /** Puts the picture's original and access copy into the data folder: plain, but of the right size. */
  async files(imageId: string): Promise<void> {
    const row = (await this.knex('images').where({ id: imageId }).first()) as PictureRow;
    const files = new PictureFiles(this.server.config.dataDir);
    const original = files.original(row.sha256);
    await mkdir(dirname(original), { recursive: true });
    const plain = sharp({ create: { width: row.width, height: row.height, channels: 3, background: '#6b5a3c' } });
    await plain.clone().jpeg().toFile(original);
    await mkdir(files.made(row), { recursive: true });
    await plain
      .tiff({ tile: true, tileWidth: 512, tileHeight: 512, pyramid: true, compression: 'jpeg' })
      .toFile(files.accessCopy(row));
  }

  async scale(imageId: string, setter: Owner, umPerPx: number): Promise<string> {
    const provenance = { by: 'optics', pixelPitchUm: umPerPx, magnification: 1, relay: 1, binning: 1 };
    const id = await this.insert('image_scales', {
      image_id: imageId,
      grounds: 'estimated',
      um_per_px_x: umPerPx,
      um_per_px_y: umPerPx,
      relative_uncertainty: 0.05,
      provenance: JSON.stringify(provenance),
      set_by: setter.id,
      set_at: this.now(),
    });
    await this.knex('images').where({ id: imageId }).update({ current_scale_id: id });
    return id;
  }

  async series(
    findId: string,
    observer: Owner,
    structure = 'spore',
    preparationId: string | null = null,
  ): Promise<string> {
    return this.insert('series', {
      find_id: findId,
      preparation_id: preparationId,
      observer_id: observer.id,
      structure,
      edge_rule: 'outer',
      ornament_included: 0,
      created_at: this.now(),
    });
  }

  async rig(owner: Owner, name = 'the bench microscope'): Promise<string> {
    return this.insert('rigs', { owner_id: owner.id, name, camera: 'a camera', remarks: '', created_at: this.now() });
  }

  async setting(rigId: string, name = '40×'): Promise<string> {
    return this.insert('settings', {
      rig_id: rigId,
      name,
      objective: 'plan 40/0.65',
      magnification: 40,
      numerical_aperture: 0.65,
      one_sitting: 0,
      capture_mode: 'still',
      created_at: this.now(),
    });
  }

  async taxon(name: string, options: { rank?: string; parentId?: string; code?: string } = {}): Promise<string> {
    return this.insert('taxa', {
      name,
      authorship: '',
      rank: options.rank ?? 'species',
      code: options.code ?? 'botanical',
      parent_id: options.parentId ?? null,
      created_at: this.now(),
    });
  }

  /** It stands, as the finder's own first name would. */
  async determination(findId: string, taxonId: string, by: Owner): Promise<string> {
    const taxon = (await this.knex('taxa').where({ id: taxonId }).first()) as Record<'name' | 'rank' | 'code', string>;
    const id = await this.insert('determinations', {
      find_id: findId,
      taxon_id: taxonId,
      name: taxon.name,
      authorship: '',
      rank: taxon.rank,
      code: taxon.code,
      qualifier: '',
      reason: 'by the look of it',
      confidence: 'certain',
      by_id: by.id,
      determined_at: this.now(),
    });
    await this.knex('finds').where({ id: findId }).update({ standing_id: id });
    return id;
  }

  private async nextNumber(): Promise<number> {
    const counter = this.knex('counters').where({ name: 'find-number' });
    const [row] = (await counter.increment('value', 1).returning('value')) as { value: number }[];
    if (!row) throw new Error('There is no counter of finds.');
    return row.value;
  }

  private get knex(): Knex {
    return this.server.db.write;
  }

  private now(): string {
    return this.server.clock.now().toISOString();
  }

  private async insert(table: string, columns: Record<string, unknown>): Promise<string> {
    const id = newId();
    await this.knex(table).insert({ id, ...columns });
    return id;
  }
}
