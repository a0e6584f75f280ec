import exifr from 'exifr';
import type { Capture } from '../../shared/contracts/images.js';
import {
  pitchAfterDigitalZoom,
  pitchFromFilmEquivalent,
  pitchFromFocalPlane,
} from '../../shared/scale/optics-scale.js';

export interface CaptureNotes {
  readonly capture: Capture;
  /** kept in private columns, shown to the owner alone */
  readonly exactPlace: { readonly latitude: number; readonly longitude: number } | null;
}

export const NO_NOTES: CaptureNotes = {
  capture: { local: null, offset: null, camera: null, lens: null, focalLengthMm: null, pixelPitchUm: null },
  exactPlace: null,
};

/** Sensors of cameras that people own have pixels of 0.5 to 30 µm; beyond, the tag is wrong. Common practice, no source. */
const LIKELY_PITCH_UM = { least: 0.5, most: 30 };

/**
 * What a file says of its own making. Notes are a help, never a reason to refuse a picture: what can't be read is null.
 *
 * @param source a TIFF's path, or the Exif block of another file
 * @param stored its size as stored, px, before it is made upright
 */
export async function readCaptureNotes(
  source: string | Buffer,
  stored: { width: number; height: number },
): Promise<CaptureNotes> {
  const input = typeof source === 'string' ? source : withoutExifHead(source);
  try {
    const tags = (await exifr.parse(input, OPTIONS)) as Tags | undefined;
    return tags ? toNotes(tags, stored) : NO_NOTES;
  } catch {
    return NO_NOTES; // broken notes, or none where the reader wants some
  }
}

const OPTIONS = {
  tiff: true,
  exif: true,
  gps: true,
  translateValues: false,
  reviveValues: false,
  xmp: false,
  icc: false,
  iptc: false,
  makerNote: false,
  userComment: false,
};

/** exifr wants to begin at the TIFF header; in JPEG and WebP `Exif\0\0` stands before it. */
function withoutExifHead(block: Buffer): Buffer {
  return block.subarray(0, 6).toString('latin1') === 'Exif\0\0' ? block.subarray(6) : block;
}

type Tags = Readonly<Record<string, unknown>>;

/** Tag names as in Exif 3.0 (CIPA DC-008). */
export function toNotes(tags: Tags, stored: { width: number; height: number }): CaptureNotes {
  const { local, offset } = captureTime(tags);
  return {
    capture: {
      local,
      offset,
      camera: cameraName(text(tags['Make']), text(tags['Model'])),
      lens: text(tags['LensModel']),
      focalLengthMm: positive(tags['FocalLength']),
      pixelPitchUm: pixelPitch(tags, stored),
    },
    exactPlace: place(tags),
  };
}

/** The first of the three times that is one, with the offset that belongs to it. */
function captureTime(tags: Tags): { local: string | null; offset: string | null } {
  for (const [time, zone] of [
    ['DateTimeOriginal', 'OffsetTimeOriginal'],
    ['CreateDate', 'OffsetTimeDigitized'], // as exifr names DateTimeDigitized
    ['ModifyDate', 'OffsetTime'], // and DateTime
  ] as const) {
    const parts = /^(\d{4})[:-](\d\d)[:-](\d\d)[ T](\d\d):(\d\d):(\d\d)/.exec(text(tags[time]) ?? '');
    if (!parts) continue;
    const [, year, month, day, hour, minute, second] = parts;
    const local = `${year}-${month}-${day}T${hour}:${minute}:${second}`;
    const read = new Date(`${local}Z`); // 0000:00:00 and the 31st of April are no times
    if (Number.isNaN(read.getTime()) || read.toISOString().slice(0, 19) !== local || Number(year) === 0) continue;
    const offset = /^[+-]\d\d:\d\d$/.exec(text(tags[zone]) ?? '')?.[0] ?? null;
    // +99:99 is written like an offset and is none
    return { local, offset: offset !== null && Number.isNaN(Date.parse(`${local}${offset}`)) ? null : offset };
  }
  return { local: null, offset: null };
}

function cameraName(make: string | null, model: string | null): string | null {
  if (!make || !model) return model ?? make;
  return model.toLowerCase().startsWith(make.toLowerCase()) ? model : `${make} ${model}`;
}

/** null where the file's pixels are not the sensor's: then neither tag speaks of them. */
function pixelPitch(tags: Tags, stored: { width: number; height: number }): number | null {
  const recorded = { width: positive(tags['ExifImageWidth']), height: positive(tags['ExifImageHeight']) };
  if (recorded.width !== null && recorded.width !== stored.width) return null;
  if (recorded.height !== null && recorded.height !== stored.height) return null;
  const zoom = tags['DigitalZoomRatio'];
  const pitch = focalPlanePitch(tags) ?? filmEquivalentPitch(tags, stored);
  if (pitch === null) return null;
  const zoomed = typeof zoom === 'number' && zoom >= 1 ? pitchAfterDigitalZoom(pitch, zoom) : pitch;
  return zoomed >= LIKELY_PITCH_UM.least && zoomed <= LIKELY_PITCH_UM.most ? zoomed : null;
}

function focalPlanePitch(tags: Tags): number | null {
  const resolution = positive(tags['FocalPlaneXResolution']);
  const unit = positive(tags['FocalPlaneResolutionUnit']);
  return resolution === null ? null : pitchFromFocalPlane(resolution, unit ?? undefined);
}

function filmEquivalentPitch(tags: Tags, stored: { width: number; height: number }): number | null {
  const focal = positive(tags['FocalLength']);
  const film = positive(tags['FocalLengthIn35mmFormat']);
  if (focal === null || film === null) return null;
  return pitchFromFilmEquivalent(focal, film, stored.width, stored.height)?.pitchUm ?? null;
}

function place(tags: Tags): CaptureNotes['exactPlace'] {
  const { latitude, longitude } = tags;
  if (typeof latitude !== 'number' || typeof longitude !== 'number') return null;
  if (!(Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180)) return null; // also NaN
  return latitude === 0 && longitude === 0 ? null : { latitude, longitude }; // cameras without a fix write zeros
}

function text(value: unknown): string | null {
  if (typeof value !== 'string') return null;
  const clean = value
    .replace(/[\p{Cc}\s]+/gu, ' ')
    .trim()
    .slice(0, 120);
  return clean === '' ? null : clean;
}

function positive(value: unknown): number | null {
  return typeof value === 'number' && Number.isFinite(value) && value > 0 ? value : null;
}
