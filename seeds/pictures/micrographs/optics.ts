/**
 * Image of a layered specimen in a microscope with a condenser: for each of many directions of illumination a plane
 * wave is carried through the layers, through the objective's pupil, and its intensity is added to the others.
 * Bright field, dark field, fringes at edges, and the look of things out of focus all follow from that.
 *
 * @see Cowley & Moodie 1957, "The scattering of electrons by atoms and crystals" (the method of slices)
 * @see Born & Wolf, Principles of Optics, §10.6 (Abbe's account of the illuminated object)
 */
import { SquareFft } from './fft.js';
import type { Specimen } from './specimen.js';

export interface Microscope {
  /** Numerical aperture of the objective. */
  readonly aperture: number;
  /** Illumination: numerical apertures of the condenser's inner and outer rim; inner 0 for bright field. */
  readonly condenser: { readonly inner: number; readonly outer: number };
  /** Directions of illumination for each colour. */
  readonly directions: number;
  /** Refractive index of the mounting medium. */
  readonly medium: number;
}

export interface Colour {
  /** Wavelength in vacuum, µm. */
  readonly wavelength: number;
  /** How strongly the specimen's pigment absorbs it. */
  readonly pigment: number;
}

/** Intensities on the specimen's grid; an empty bright field has 1 everywhere. */
export function formImage(specimen: Specimen, microscope: Microscope, colour: Colour, turn: number): Float32Array {
  const { side, layers } = specimen;
  const fft = new SquareFft(side);
  const size = side * side;
  const re = new Float32Array(size);
  const im = new Float32Array(size);
  const image = new Float32Array(size);
  const slides = layers.map((layer) => transmission(layer, colour));
  const sources = directions(microscope, turn);
  for (const source of sources) {
    re.fill(1);
    im.fill(0);
    layers.forEach((layer, i) => {
      multiply(re, im, slides[i]!.re, slides[i]!.im);
      const next = layers[i + 1];
      fft.transform(re, im, -1);
      // After the last layer the wave goes back to the plane in focus, and through the pupil.
      const distance = next ? next.height - layer.height : -layer.height;
      const limit = next ? microscope.medium : microscope.aperture;
      carry(re, im, specimen, microscope.medium, colour.wavelength, source, distance, limit);
      fft.transform(re, im, 1);
    });
    for (let i = 0; i < size; i++) image[i] = image[i]! + (re[i]! * re[i]! + im[i]! * im[i]!) / sources.length;
  }
  return image;
}

/** Directions spread evenly over the condenser's opening, as sines times the medium's index (Vogel's spiral). */
function directions({ condenser, directions: count }: Microscope, turn: number): { x: number; y: number }[] {
  const golden = Math.PI * (3 - Math.sqrt(5));
  return Array.from({ length: count }, (_, i) => {
    const share = (i + 0.5) / count;
    const r = Math.sqrt(condenser.inner ** 2 + share * (condenser.outer ** 2 - condenser.inner ** 2));
    return { x: r * Math.cos(i * golden + turn), y: r * Math.sin(i * golden + turn) };
  });
}

function transmission(layer: Specimen['layers'][number], colour: Colour): { re: Float32Array; im: Float32Array } {
  const re = new Float32Array(layer.path.length);
  const im = new Float32Array(layer.path.length);
  const k = (2 * Math.PI) / colour.wavelength;
  for (let i = 0; i < re.length; i++) {
    const amplitude = Math.exp(-(layer.pigment[i]! * colour.pigment + layer.soot[i]!));
    re[i] = amplitude * Math.cos(k * layer.path[i]!);
    im[i] = amplitude * Math.sin(k * layer.path[i]!);
  }
  return { re, im };
}

function multiply(re: Float32Array, im: Float32Array, byRe: Float32Array, byIm: Float32Array): void {
  for (let i = 0; i < re.length; i++) {
    const a = re[i]!;
    const b = im[i]!;
    re[i] = a * byRe[i]! - b * byIm[i]!;
    im[i] = a * byIm[i]! + b * byRe[i]!;
  }
}

/** Multiplies a spectrum by the phase of free travel over a distance, µm, and stops what leaves the limit (an NA). */
function carry(
  re: Float32Array,
  im: Float32Array,
  { side, umPerPx }: Specimen,
  medium: number,
  wavelength: number,
  source: { x: number; y: number },
  distance: number,
  limit: number,
): void {
  const unit = wavelength / (side * umPerPx); // one step of frequency, as a numerical aperture
  const k = (2 * Math.PI) / wavelength;
  const straight = Math.sqrt(medium ** 2 - source.x ** 2 - source.y ** 2);
  for (let y = 0; y < side; y++) {
    const v = (y < side / 2 ? y : y - side) * unit + source.y;
    for (let x = 0; x < side; x++) {
      const u = (x < side / 2 ? x : x - side) * unit + source.x;
      const i = y * side + x;
      const sine = u * u + v * v;
      if (sine >= limit * limit) {
        re[i] = 0;
        im[i] = 0;
        continue;
      }
      if (distance === 0) continue;
      // The tilt of the illumination itself is taken out, so that the picture stays where the specimen is.
      const phase = k * distance * (Math.sqrt(medium * medium - sine) - straight);
      const c = Math.cos(phase);
      const s = Math.sin(phase);
      const a = re[i]!;
      const b = im[i]!;
      re[i] = a * c - b * s;
      im[i] = a * s + b * c;
    }
  }
}
