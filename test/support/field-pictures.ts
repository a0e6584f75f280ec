import sharp, { type Sharp } from 'sharp';

/**
 * Pictures for the journeys, drawn here and nowhere else, so that they share no code with the demo's renderer.
 * Coordinates are upright image pixels with edges at whole numbers. Small on purpose: on a wide screen one
 * image pixel covers four or more, so that a test can click to a quarter of a pixel.
 */
export const FRAME = { width: 320, height: 212 } as const;

/** Discs of pure magenta that tests look for in screenshots: the only link between screen and picture. */
export const FIDUCIALS = [
  { x: 24, y: 20 },
  { x: 296, y: 24 },
  { x: 28, y: 190 },
] as const;
const FIDUCIAL_RADIUS = 5;

/** 10 µm are 40 px: 0.25 µm per pixel. */
export const GRADUATIONS = [60, 100, 140, 180, 220, 260].map((x, index) => ({ x, y: 106, positionUm: index * 10 }));
export const TRUE_UM_PER_PX = 0.25;

export interface Body {
  readonly x: number;
  readonly y: number;
  /** full axes, px */
  readonly length: number;
  readonly width: number;
}

/** At 0.25 µm/px: 8.5 × 6.0, 8.0 × 6.5 and 9.0 × 6.25 µm. */
export const BODIES: readonly Body[] = [
  { x: 90, y: 80, length: 34, width: 24 },
  { x: 170, y: 130, length: 32, width: 26 },
  { x: 250, y: 90, length: 36, width: 25 },
];

type Rgb = readonly [number, number, number];
/** 0–1 of each channel at a place */
type Scene = (x: number, y: number) => Rgb;

const MAGENTA: Rgb = [1, 0, 1];

function withFiducials(scene: Scene): Scene {
  return (x, y) => (FIDUCIALS.some((f) => Math.hypot(x - f.x, y - f.y) <= FIDUCIAL_RADIUS) ? MAGENTA : scene(x, y));
}

/** Each pixel is the mean of 4 × 4 samples of the scene. */
function draw(scene: Scene, width: number, height: number, full: number): Uint16Array {
  const pixels = new Uint16Array(width * height * 3);
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const sum = [0, 0, 0];
      for (let i = 0; i < 16; i++) {
        const colour = scene(column + ((i % 4) + 0.5) / 4, row + (Math.floor(i / 4) + 0.5) / 4);
        colour.forEach((value, channel) => (sum[channel] = (sum[channel] ?? 0) + value / 16));
      }
      sum.forEach((value, channel) => (pixels[(row * width + column) * 3 + channel] = Math.round(value * full)));
    }
  }
  return pixels;
}

/** Spores on a bright field, 12 bits of range in a 16-bit TIFF, as microscope cameras write them. */
export async function micrograph(): Promise<Buffer> {
  const scene = withFiducials((x, y) => {
    for (const body of BODIES) {
      const r = Math.hypot((x - body.x) / (body.length / 2), (y - body.y) / (body.width / 2));
      if (r <= 1) return r > 0.9 ? [0.15, 0.12, 0.08] : [0.7, 0.55, 0.35];
    }
    return [0.85, 0.83, 0.78];
  });
  const { width, height } = FRAME;
  return sharp(draw(scene, width, height, 4095), { raw: { width, height, channels: 3 } })
    .toColourspace('rgb16')
    .tiff({ compression: 'deflate', predictor: 'horizontal' })
    .toBuffer();
}

/** A ruling with a graduation each 10 µm, taken at the micrograph's setting. */
export async function stageMicrometer(): Promise<Buffer> {
  const scene = withFiducials((x, y) =>
    GRADUATIONS.some((line) => Math.abs(x - line.x) <= 1) && y > 70 && y < 142 ? [0.1, 0.1, 0.1] : [0.88, 0.88, 0.86],
  );
  return jpeg(scene, FRAME.width, FRAME.height).toBuffer();
}

/** A field photograph with what a camera writes into it; the camera was held upright (orientation 6). */
export async function photograph(): Promise<Buffer> {
  const scene: Scene = (x, y) =>
    Math.hypot(x - 300, y - 200) < 90
      ? [0.85, 0.6, 0.15]
      : [0.3 + 0.1 * Math.sin(x / 9), 0.22, 0.15 + 0.05 * Math.cos(y / 7)];
  return jpeg(scene, 600, 400)
    .withMetadata({ orientation: 6 })
    .withExif({
      IFD0: { Make: 'Calder', Model: 'Field 24', Artist: 'Nobody' },
      IFD2: {
        DateTimeOriginal: '2026:02:14 10:42:00',
        OffsetTimeOriginal: '+00:00',
        LensModel: '60 mm macro',
        FocalLength: '60/1',
        BodySerialNumber: 'SECRET-1234',
      },
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '56/1 30/1 0/1', GPSLongitudeRef: 'E', GPSLongitude: '3/1 12/1 0/1' },
    })
    .toBuffer();
}

function jpeg(scene: Scene, width: number, height: number): Sharp {
  return sharp(Buffer.from(Uint8Array.from(draw(scene, width, height, 255))), {
    raw: { width, height, channels: 3 },
  }).jpeg({
    quality: 95,
    chromaSubsampling: '4:4:4',
  });
}
