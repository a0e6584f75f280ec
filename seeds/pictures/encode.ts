/** Writes rendered pictures as files, with what a camera would have written into them. */
import { writeFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import sharp, { type Exif } from 'sharp';

export interface CameraNotes {
  readonly make: string;
  readonly model: string;
  readonly lens: string;
  /** Local time, as in EXIF: `2025:11:03 10:42:00`. */
  readonly taken: string;
  readonly offset: string;
  readonly focalLengthMm?: number;
  readonly aperture?: string;
  readonly exposure?: string;
  readonly iso?: number;
  readonly sensorWidthMm?: number;
  readonly place?: { readonly latitude: number; readonly longitude: number };
}

export function renderedPath(file: string): string {
  return fileURLToPath(new URL(`./rendered/${file}`, import.meta.url));
}

/** JPEG as large as fits the limit: quality goes down until it does. */
export async function writeJpeg(
  file: string,
  pixels: Uint8Array,
  width: number,
  height: number,
  notes: CameraNotes,
  limitBytes = 490_000,
): Promise<void> {
  for (let quality = 90; quality >= 50; quality -= 3) {
    const picture = sharp(pixels, { raw: { width, height, channels: 3 } })
      .withExif(exif(notes, width))
      .jpeg({ quality, chromaSubsampling: '4:2:0', mozjpeg: true });
    const bytes = await picture.toBuffer();
    if (bytes.length > limitBytes) continue;
    await writeFile(renderedPath(file), bytes);
    return;
  }
  throw new Error(`${file} does not fit into ${limitBytes} bytes.`);
}

/** Grey TIFF of 16 bits a pixel. */
export async function writeGreyTiff(file: string, pixels: Uint16Array, width: number, height: number): Promise<void> {
  await sharp(pixels, { raw: { width, height, channels: 1 } })
    .toColourspace('grey16')
    .tiff({ compression: 'deflate', predictor: 'horizontal' })
    .toFile(renderedPath(file));
}

function exif(notes: CameraNotes, width: number): Exif {
  const photo: Record<string, string> = {
    DateTimeOriginal: notes.taken,
    DateTimeDigitized: notes.taken,
    OffsetTimeOriginal: notes.offset,
    OffsetTimeDigitized: notes.offset,
    LensModel: notes.lens,
  };
  if (notes.focalLengthMm) photo['FocalLength'] = `${notes.focalLengthMm}/1`;
  if (notes.aperture) photo['FNumber'] = notes.aperture;
  if (notes.exposure) photo['ExposureTime'] = notes.exposure;
  if (notes.iso) photo['ISOSpeedRatings'] = String(notes.iso);
  if (notes.sensorWidthMm) {
    photo['FocalPlaneXResolution'] = `${Math.round((width / notes.sensorWidthMm) * 10_000)}/1000`;
    photo['FocalPlaneYResolution'] = photo['FocalPlaneXResolution'];
    photo['FocalPlaneResolutionUnit'] = '3'; // centimetres
  }
  return {
    IFD0: { Make: notes.make, Model: notes.model, DateTime: notes.taken },
    IFD2: photo,
    ...(notes.place ? { IFD3: gps(notes.place) } : {}),
  };
}

function gps({ latitude, longitude }: { latitude: number; longitude: number }): Record<string, string> {
  return {
    GPSLatitudeRef: latitude < 0 ? 'S' : 'N',
    GPSLatitude: sexagesimal(Math.abs(latitude)),
    GPSLongitudeRef: longitude < 0 ? 'W' : 'E',
    GPSLongitude: sexagesimal(Math.abs(longitude)),
  };
}

function sexagesimal(degrees: number): string {
  const whole = Math.floor(degrees);
  const minutes = Math.floor((degrees - whole) * 60);
  const seconds = Math.round(((degrees - whole) * 60 - minutes) * 60 * 100);
  return `${whole}/1 ${minutes}/1 ${seconds}/100`;
}
