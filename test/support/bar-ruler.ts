import sharp from 'sharp';

/**
 * Reads the length of a drawn-in bar back from two downloads of one picture, with and without it. Knows nothing of
 * how bars are drawn but this: something is laid over the picture as an even veil, and the lowest light thing
 * on it is the bar.
 */

export interface BarReading {
  /** between the outermost 50 % crossings, px of the download */
  readonly lengthPx: number;
  readonly left: number;
  readonly right: number;
}

/** What differs between the two by less is the encoder's doing. */
const CHANGED = 24;

/** @returns null when nothing was drawn in, or nothing light on it */
export async function readBar(withBar: Buffer, without: Buffer): Promise<BarReading | null> {
  const [drawn, plain] = await Promise.all([greys(withBar), greys(without)]);
  const box = changedBox(drawn, plain);
  if (!box) return null;
  const veil = veilOf(drawn, plain, box);
  const cover = (x: number, y: number): number => {
    const ground = veil.offset + veil.share * at(plain, x, y);
    return Math.min(1, Math.max(0, (at(drawn, x, y) - ground) / (255 - ground)));
  };
  const rows = lowestLightRows(box, cover);
  if (!rows) return null;
  const columns = Array.from({ length: box.right - box.left }, (_, i) =>
    Math.max(...Array.from({ length: rows.bottom - rows.top }, (_row, j) => cover(box.left + i, rows.top + j))),
  );
  const left = box.left + crossing(columns);
  const right = box.left + columns.length - crossing([...columns].reverse());
  return { lengthPx: right - left, left, right };
}

interface Greys {
  readonly values: Uint8Array;
  readonly width: number;
  readonly height: number;
}

interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

async function greys(bytes: Buffer): Promise<Greys> {
  const { data, info } = await sharp(bytes)
    .removeAlpha()
    .toColourspace('b-w')
    .raw()
    .toBuffer({ resolveWithObject: true });
  return { values: data, width: info.width, height: info.height };
}

function at({ values, width }: Greys, x: number, y: number): number {
  return values[y * width + x] as number;
}

function changedBox(drawn: Greys, plain: Greys): Box | null {
  const box = { left: drawn.width, top: drawn.height, right: 0, bottom: 0 };
  for (let y = 0; y < drawn.height; y++) {
    for (let x = 0; x < drawn.width; x++) {
      if (Math.abs(at(drawn, x, y) - at(plain, x, y)) < CHANGED) continue;
      box.left = Math.min(box.left, x);
      box.top = Math.min(box.top, y);
      box.right = Math.max(box.right, x + 1);
      box.bottom = Math.max(box.bottom, y + 1);
    }
  }
  return box.right > box.left ? box : null;
}

/** Along the rim of the box, where there is only ground: drawn = offset + share · plain, by least squares. */
function veilOf(drawn: Greys, plain: Greys, box: Box): { offset: number; share: number } {
  const pairs: [number, number][] = [];
  for (let y = box.top + 1; y < box.bottom - 1; y++) {
    for (let x = box.left + 1; x < box.right - 1; x++) {
      const rim = Math.min(x - box.left, box.right - 1 - x, y - box.top, box.bottom - 1 - y) <= 2;
      if (rim) pairs.push([at(plain, x, y), at(drawn, x, y)]);
    }
  }
  const mean = (pick: 0 | 1) => pairs.reduce((sum, pair) => sum + pair[pick], 0) / pairs.length;
  const [mx, my] = [mean(0), mean(1)];
  const sxx = pairs.reduce((sum, [x]) => sum + (x - mx) ** 2, 0);
  const share = sxx < 1e-6 ? 0 : pairs.reduce((sum, [x, y]) => sum + (x - mx) * (y - my), 0) / sxx;
  return { offset: my - share * mx, share };
}

function lowestLightRows(box: Box, cover: (x: number, y: number) => number): { top: number; bottom: number } | null {
  const light = (y: number): boolean => {
    for (let x = box.left; x < box.right; x++) if (cover(x, y) > 0.5) return true;
    return false;
  };
  let bottom = box.bottom;
  while (bottom > box.top && !light(bottom - 1)) bottom--;
  let top = bottom;
  while (top > box.top && light(top - 1)) top--;
  return top === bottom ? null : { top, bottom };
}

/** Where a row of covers first passes one half, between the middles of two pixels; pixel edges at whole numbers. */
function crossing(columns: readonly number[]): number {
  const i = columns.findIndex((cover) => cover >= 0.5);
  const [before, after] = [columns[i - 1] ?? 0, columns[i] as number];
  return i - 0.5 + (0.5 - before) / (after - before);
}
