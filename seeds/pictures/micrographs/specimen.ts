/**
 * What lies under the microscope: a stack of thin layers, each a map of how much light is delayed and absorbed there.
 * A thick body is spread over neighbouring layers, so that only part of it is in focus at once.
 */
export interface Layer {
  /** Height over the plane in focus, µm; positive is nearer to the objective. */
  readonly height: number;
  /** Optical path added by the specimen, µm. */
  readonly path: Float32Array;
  /** Absorbance (natural, of amplitude) by the specimen's own pigment; colours weigh it per wavelength. */
  readonly pigment: Float32Array;
  /** Absorbance (natural, of amplitude) that is the same for every colour: dust, chromium. */
  readonly soot: Float32Array;
}

export class Specimen {
  readonly layers: readonly Layer[];

  /**
   * @param side  of the square grid, px, a power of two and larger than the picture
   * @param umPerPx  µm per grid pixel
   * @param heights  of the layers over the plane in focus, µm
   */
  constructor(
    readonly side: number,
    readonly umPerPx: number,
    heights: readonly number[],
  ) {
    const map = (): Float32Array => new Float32Array(side * side);
    this.layers = [...heights]
      .sort((a, b) => a - b)
      .map((height) => ({ height, path: map(), pigment: map(), soot: map() }));
  }

  /** The layers on either side of a height, and how much of what lies there belongs to each. */
  share(height: number): { layer: Layer; part: number }[] {
    const { layers } = this;
    const first = layers[0]!;
    const last = layers[layers.length - 1]!;
    if (height <= first.height) return [{ layer: first, part: 1 }];
    if (height >= last.height) return [{ layer: last, part: 1 }];
    const above = layers.findIndex((layer) => layer.height > height);
    const upper = layers[above]!;
    const lower = layers[above - 1]!;
    const part = (height - lower.height) / (upper.height - lower.height);
    return [
      { layer: lower, part: 1 - part },
      { layer: upper, part },
    ];
  }

  nearest(height: number): Layer {
    return this.layers.reduce((a, b) => (Math.abs(b.height - height) < Math.abs(a.height - height) ? b : a));
  }

  /** Calls `paint` for every grid pixel within `reach` of a point, with the offset of the pixel's middle in µm. */
  around(x: number, y: number, reachUm: number, paint: (index: number, dx: number, dy: number) => void): void {
    const { side, umPerPx } = this;
    const reach = reachUm / umPerPx;
    const top = Math.max(0, Math.floor(y - reach));
    const bottom = Math.min(side - 1, Math.ceil(y + reach));
    const left = Math.max(0, Math.floor(x - reach));
    const right = Math.min(side - 1, Math.ceil(x + reach));
    for (let py = top; py <= bottom; py++) {
      for (let px = left; px <= right; px++) {
        paint(py * side + px, (px + 0.5 - x) * umPerPx, (py + 0.5 - y) * umPerPx);
      }
    }
  }
}
