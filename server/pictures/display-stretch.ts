import sharp, { type SharpOptions } from 'sharp';

const FULL = 65_535;
/** shares of the values that may be cut off at the dark and at the bright end */
const DARK_SHARE = 0.001;
const BRIGHT_SHARE = 0.999;
/** A picture that spans at least half of the range shows well as it is. */
const ENOUGH_SPAN = FULL / 2;

export interface Stretch {
  readonly gain: number;
  readonly offset: number;
}

/**
 * How to show a 16-bit picture on screens: 12 bits kept in 16 would show as 0–14 of 255. One line for all
 * channels, so that colours keep their balance. Only what is shown is stretched, never the original.
 *
 * @returns null when it needs none
 */
export async function displayStretch(path: string, options: SharpOptions): Promise<Stretch | null> {
  const { channels = 3 } = await sharp(path, options).metadata();
  const grey = channels < 3;
  const { data } = await sharp(path, options)
    .resize({ width: 1024, height: 1024, fit: 'inside', withoutEnlargement: true, kernel: 'nearest' })
    .removeAlpha()
    .toColourspace(grey ? 'grey16' : 'rgb16')
    .raw({ depth: 'ushort' })
    .toBuffer({ resolveWithObject: true });
  return stretchFor(new Uint16Array(data.buffer, data.byteOffset, data.length / 2));
}

export function stretchFor(values: Uint16Array): Stretch | null {
  const counts = new Uint32Array(FULL + 1);
  for (const value of values) counts[value] = (counts[value] ?? 0) + 1;
  const dark = valueAt(counts, DARK_SHARE * values.length);
  const bright = valueAt(counts, BRIGHT_SHARE * values.length);
  if (bright <= dark || bright - dark >= ENOUGH_SPAN) return null;
  const gain = FULL / (bright - dark);
  return { gain, offset: -dark * gain };
}

function valueAt(counts: Uint32Array, rank: number): number {
  let seen = 0;
  for (let value = 0; value < counts.length; value++) {
    seen += counts[value] ?? 0;
    if (seen > rank) return value;
  }
  return counts.length - 1;
}
