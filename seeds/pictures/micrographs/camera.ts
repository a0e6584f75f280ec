/** The microscope's camera: crops the grid to the picture, lights it unevenly, adds noise, and rounds to numbers. */
import { Random } from '../random.js';

export interface Frame {
  /** Left and top of the picture on the grid, px. */
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

export interface Lamp {
  /** Brightest place, as parts of width and height, and how much darker the corners are. */
  readonly x: number;
  readonly y: number;
  readonly fall: number;
}

/** Light that reaches each pixel, 1 in an empty bright field. */
export function crop(image: Float32Array, side: number, frame: Frame, lamp: Lamp): Float32Array {
  const out = new Float32Array(frame.width * frame.height);
  const reach = Math.hypot(frame.width, frame.height) / 2;
  for (let y = 0; y < frame.height; y++) {
    for (let x = 0; x < frame.width; x++) {
      const d = Math.hypot(x - lamp.x * frame.width, y - lamp.y * frame.height) / reach;
      out[y * frame.width + x] = image[(y + frame.top) * side + x + frame.left]! * (1 - lamp.fall * d * d);
    }
  }
  return out;
}

/** One 12-bit camera frame, averaged over several exposures, in a 16-bit container. */
export function monochrome(light: Float32Array, seed: number, white: number, noise: number): Uint16Array {
  const random = new Random(seed);
  const black = 96;
  return Uint16Array.from(light, (value) => {
    const signal = value * (white - black);
    const spread = noise * Math.sqrt(0.25 + signal / white);
    return Math.max(0, Math.min(4095, Math.round(black + signal + spread * random.normal())));
  });
}

/** An 8-bit colour frame; `tint` is the colour of the empty field (0 to 1), the curve is a gentle shoulder. */
export function colour(
  channels: readonly [Float32Array, Float32Array, Float32Array],
  tint: readonly [number, number, number],
  seed: number,
  noise: number,
): Uint8Array {
  const random = new Random(seed);
  const size = channels[0].length;
  const out = new Uint8Array(size * 3);
  for (let i = 0; i < size; i++) {
    const shared = random.normal();
    for (let c = 0; c < 3; c++) {
      const linear = channels[c]![i]! * tint[c]!;
      const grain = noise * Math.sqrt(0.02 + linear) * (0.7 * shared + 0.7 * random.normal());
      out[i * 3 + c] = Math.max(0, Math.min(255, Math.round(255 * shoulder(linear + grain))));
    }
  }
  return out;
}

function shoulder(linear: number): number {
  const x = Math.max(0, linear);
  const soft = x < 0.7 ? x : 0.7 + 0.3 * (1 - Math.exp(-(x - 0.7) / 0.3));
  return soft <= 0.0031308 ? 12.92 * soft : 1.055 * soft ** (1 / 2.4) - 0.055;
}
