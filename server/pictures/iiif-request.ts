import { HttpProblem } from '../problem.js';

interface Size {
  readonly width: number;
  readonly height: number;
}

/** A request of the IIIF Image API 3.0, resolved for one picture. */
export interface IiifRequest {
  /** px of the picture */
  readonly region: { readonly x: number; readonly y: number; readonly width: number; readonly height: number };
  /** of the answer before it is turned, px */
  readonly size: Size;
  readonly mirrored: boolean;
  readonly rotation: 0 | 90 | 180 | 270;
  readonly quality: 'color' | 'gray' | 'bitonal' | 'default';
  readonly format: IiifFormat;
}

export const IIIF_FORMATS = ['jpg', 'png', 'webp'] as const;
export type IiifFormat = (typeof IIIF_FORMATS)[number];
const QUALITIES = ['default', 'color', 'gray', 'bitonal'] as const;

/** No answer has more pixels than this: a picture of 30,000 × 30,000 gave none in 20 seconds. */
export const MAX_AREA = 4096 * 4096;

/**
 * Reads the four parts of an image request.
 *
 * A parser of our own: the one at hand takes `full` for a size, floors where the specification's examples
 * round, refuses `!w,h` larger than the region, and silently shrinks what is over the limit.
 *
 * @param picture its full size, px
 * @throws {HttpProblem} 400 `iiif-region`, `iiif-size`, `iiif-rotation`, `iiif-quality`
 * @see IIIF Image API 3.0, §4.1–4.5; a size over `maxArea` is an error by §5.3
 */
export function parseIiifRequest(
  parts: { readonly region: string; readonly size: string; readonly rotation: string; readonly file: string },
  picture: Size,
  maxArea = MAX_AREA,
): IiifRequest {
  const region = parseRegion(parts.region, picture);
  const dot = parts.file.lastIndexOf('.');
  const quality = QUALITIES.find((known) => known === parts.file.slice(0, Math.max(0, dot)));
  const format = IIIF_FORMATS.find((known) => known === parts.file.slice(dot + 1));
  if (!quality || !format) throw bad('quality', parts.file);
  return { region, size: parseSize(parts.size, region, maxArea), ...parseRotation(parts.rotation), quality, format };
}

const INTEGER = '\\d{1,9}';
const DECIMAL = '(?:\\d{1,9}(?:\\.\\d{1,12})?|\\.\\d{1,12})';

function parseRegion(text: string, { width, height }: Size): IiifRequest['region'] {
  if (text === 'full') return { x: 0, y: 0, width, height };
  if (text === 'square') {
    const side = Math.min(width, height);
    return { x: Math.floor((width - side) / 2), y: Math.floor((height - side) / 2), width: side, height: side };
  }
  const pixels = new RegExp(`^(${INTEGER}),(${INTEGER}),(${INTEGER}),(${INTEGER})$`).exec(text);
  const percent = new RegExp(`^pct:(${DECIMAL}),(${DECIMAL}),(${DECIMAL}),(${DECIMAL})$`).exec(text);
  const [x, y, w, h] = (pixels ?? percent ?? []).slice(1).map(Number) as [number, number, number, number];
  if (pixels) return cropTo({ x, y, right: x + w, bottom: y + h }, { width, height }, text);
  if (!percent) throw bad('region', text);
  // both edges are rounded, so that regions side by side neither overlap nor leave a gap
  const at = (share: number, whole: number) => Math.round((share / 100) * whole);
  return cropTo(
    { x: at(x, width), y: at(y, height), right: at(x + w, width), bottom: at(y + h, height) },
    { width, height },
    text,
  );
}

function cropTo(
  { x, y, right, bottom }: { x: number; y: number; right: number; bottom: number },
  { width, height }: Size,
  text: string,
): IiifRequest['region'] {
  const region = { x, y, width: Math.min(right, width) - x, height: Math.min(bottom, height) - y };
  if (region.width <= 0 || region.height <= 0) throw bad('region', text);
  return region;
}

function parseSize(text: string, region: Size, maxArea: number): Size {
  const upscales = text.startsWith('^');
  const size = sizeOf(upscales ? text.slice(1) : text, region, upscales, maxArea);
  if (!size || size.width < 1 || size.height < 1) throw bad('size', text);
  if (!upscales && (size.width > region.width || size.height > region.height)) throw bad('size', text);
  if (size.width * size.height > maxArea) throw bad('size', text);
  return size;
}

function sizeOf(text: string, region: Size, upscales: boolean, maxArea: number): Size | null {
  if (text === 'max') {
    const most = Math.sqrt(maxArea / (region.width * region.height));
    return scaled(region, upscales ? most : Math.min(1, most), Math.floor);
  }
  const percent = new RegExp(`^pct:(${DECIMAL})$`).exec(text);
  if (percent) return scaled(region, Number(percent[1]) / 100, Math.round);
  const box = new RegExp(`^(!?)(${INTEGER})?,(${INTEGER})?$`).exec(text);
  if (!box) return null;
  const [, confined, w, h] = box;
  if (w !== undefined && h !== undefined) {
    const asked = { width: Number(w), height: Number(h) };
    return confined ? confine(asked, region, upscales, maxArea) : asked;
  }
  if (confined) return null;
  if (w !== undefined)
    return { width: Number(w), height: Math.max(1, Math.round((Number(w) * region.height) / region.width)) };
  if (h !== undefined)
    return { width: Math.max(1, Math.round((Number(h) * region.width) / region.height)), height: Number(h) };
  return null;
}

/** As large as fits the box, the region unless it may grow, and the limit; the aspect is kept. */
function confine(box: Size, region: Size, upscales: boolean, maxArea: number): Size | null {
  if (box.width === 0 || box.height === 0) return null;
  const fits = Math.min(box.width / region.width, box.height / region.height, upscales ? Infinity : 1);
  const most = Math.sqrt(maxArea / (region.width * region.height));
  return most < fits ? scaled(region, most, Math.floor) : scaled(region, fits, Math.round);
}

function scaled({ width, height }: Size, by: number, round: (value: number) => number): Size | null {
  if (by === 0) return null;
  return { width: Math.max(1, round(width * by)), height: Math.max(1, round(height * by)) };
}

function parseRotation(text: string): Pick<IiifRequest, 'mirrored' | 'rotation'> {
  const parts = new RegExp(`^(!?)(${DECIMAL})$`).exec(text);
  const degrees = Number(parts?.[2]);
  if (!parts || degrees > 360 || degrees % 90 !== 0) throw bad('rotation', text);
  return { mirrored: parts[1] === '!', rotation: (degrees % 360) as IiifRequest['rotation'] };
}

function bad(part: 'region' | 'size' | 'rotation' | 'quality', text: string): HttpProblem {
  return new HttpProblem(400, `iiif-${part}`, `Not a ${part} that this picture can answer: ${text.slice(0, 80)}`);
}
