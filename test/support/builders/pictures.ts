import { newId } from '../../../server/ids.js';
import type { TestApp } from '../app.js';

/** What a test says of a picture that it puts straight into the tables, without a file behind it. */
export interface PictureOptions {
  readonly ownerId: string;
  readonly width?: number;
  readonly height?: number;
  readonly state?: 'waiting' | 'working' | 'ready' | 'refused';
  readonly title?: string;
  readonly light?: string;
  readonly uploadedAt?: string;
  readonly settingId?: string;
}

/**
 * A picture in its owner's tray, as intake leaves it.
 * @returns its id
 */
export async function addPicture(server: TestApp, options: PictureOptions): Promise<string> {
  const id = newId();
  await server.db.write('images').insert({
    id,
    owner_id: options.ownerId,
    state: options.state ?? 'ready',
    sha256: id.replaceAll('-', '').padEnd(64, '0'),
    original_name: `${options.title ?? 'picture'}.jpg`,
    bytes: 1000,
    format: 'jpeg',
    width: options.width ?? 1600,
    height: options.height ?? 1200,
    bit_depth: 8,
    title: options.title ?? '',
    light: options.light ?? 'unknown',
    licence: 'by',
    credit_line: 'Somebody',
    setting_id: options.settingId ?? null,
    colours: '["#111111","#222222","#333333"]',
    rendition_widths: '[320]',
    uploaded_at: options.uploadedAt ?? server.clock.now().toISOString(),
  });
  return id;
}
