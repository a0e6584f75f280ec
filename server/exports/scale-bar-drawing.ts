import { type BarLayout, barLayout } from '../../shared/scale/scale-bar.js';
import type { Scale } from '../../shared/scale/scale.js';
import { outlineText } from './outlined-text.js';

/** An SVG to lay over a picture at whole pixels; 1 unit is 1 px of the picture. */
export interface Overlay {
  readonly svg: string;
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

const NO_SCALE = 'no scale';
const INK = '#15130f';
const GROUND_OPACITY = 0.75;
const BAR = '#ffffff';

/**
 * The bar of a picture as it is carried away, at the lower left on a dark ground. Its length is that of the
 * scale to a fraction of a pixel: the left end lies on a pixel's edge, the right one where it falls, and is
 * smoothed. A picture without scale says so in words.
 *
 * @param picture  size that it is sent in, px
 * @param original width of the upright original, px
 */
export function scaleBarOverlay(input: {
  readonly picture: { readonly width: number; readonly height: number };
  readonly original: { readonly width: number };
  readonly scale: Scale | null;
}): Overlay {
  const { picture, original, scale } = input;
  const layout = barLayout({
    imageWidthPx: picture.width,
    umPerPx: scale && (scale.umPerPxX * original.width) / picture.width,
    grounds: scale?.grounds ?? 'none',
  });
  const em = emFor(picture);
  const label = outlineText(layout?.label ?? NO_SCALE, em);
  const padding = Math.ceil(em * 0.55);
  const barHeight = layout ? Math.max(4, Math.round(em * 0.5)) : 0;
  const gap = layout ? Math.ceil(em * 0.35) : 0;
  const capHeight = Math.ceil(em * 0.72);
  const inner = Math.max(layout?.lengthPx ?? 0, label.width);
  const width = Math.ceil(inner) + 2 * padding;
  const height = 2 * padding + capHeight + gap + barHeight;
  const barLeft = padding + Math.round((inner - (layout?.lengthPx ?? 0)) / 2);
  const labelLeft = padding + (inner - label.width) / 2;
  const bar = layout ? drawBar(layout, barLeft, padding + capHeight + gap, barHeight) : '';
  const svg =
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">` +
    `<rect width="${width}" height="${height}" fill="${INK}" fill-opacity="${GROUND_OPACITY}"/>` +
    `<path transform="translate(${number(labelLeft)} ${padding + capHeight})" d="${label.path}" fill="${BAR}"/>` +
    `${bar}</svg>`;
  const margin = Math.round(em * 0.8);
  return {
    svg,
    left: Math.max(0, Math.min(margin, picture.width - width)),
    top: Math.max(0, picture.height - margin - height),
    width,
    height,
  };
}

/** Large enough to read on a small copy, and in keeping with a large one. */
function emFor({ width, height }: { width: number; height: number }): number {
  return Math.max(10, Math.round(Math.min(width, height * 1.5) * 0.022));
}

/** The bar's look tells its grounds: solid with ticks, open, dashed. All of it lies between its two ends. */
function drawBar({ look, lengthPx }: BarLayout, x: number, y: number, height: number): string {
  switch (look) {
    case 'solid-with-ticks': {
      const tick = Math.min(Math.max(2, Math.round(height * 0.25)), lengthPx / 4);
      const middle = Math.max(2, Math.round(height * 0.4));
      const top = y + Math.round((height - middle) / 2);
      return rect(x, top, lengthPx, middle) + rect(x, y, tick, height) + rect(x + lengthPx - tick, y, tick, height);
    }
    case 'open': {
      const line = Math.min(Math.max(1, Math.round(height * 0.18)), lengthPx / 4);
      return (
        rect(x, y, lengthPx, line) +
        rect(x, y + height - line, lengthPx, line) +
        rect(x, y, line, height) +
        rect(x + lengthPx - line, y, line, height)
      );
    }
    case 'dashed': {
      // an odd number of equal pieces: it begins and ends with a dash
      const pieces = Math.max(3, Math.round(lengthPx / (height * 1.2) / 2) * 2 + 1);
      const piece = lengthPx / pieces;
      const thick = Math.max(3, Math.round(height * 0.6));
      const top = y + Math.round((height - thick) / 2);
      const dashes = Array.from({ length: (pieces + 1) / 2 }, (_, i) => rect(x + 2 * i * piece, top, piece, thick));
      return dashes.join('');
    }
    case 'words':
      return '';
  }
}

function rect(x: number, y: number, width: number, height: number): string {
  return `<rect x="${number(x)}" y="${number(y)}" width="${number(width)}" height="${number(height)}" fill="${BAR}"/>`;
}

/** A thousandth of a pixel is finer than anything that is drawn. */
function number(value: number): string {
  return String(Number(value.toFixed(4)));
}
