/**
 * How we know what one pixel means.
 *
 * - `calibrated`: a stage micrometer photographed at the same setting
 * - `referenced`: a ruler or an object of known size in the frame
 * - `estimated`: a finger in the frame, or optics by calculation
 * - `none`: not known; the picture measures in pixels and ratios only
 */
export const GROUNDS = ['calibrated', 'referenced', 'estimated', 'none'] as const;
export type Grounds = (typeof GROUNDS)[number];

/** What one pixel of an upright original covers. */
export interface Scale {
  /** µm per pixel along x; positive */
  readonly umPerPxX: number;
  /** µm per pixel along y; positive */
  readonly umPerPxY: number;
  /** standard uncertainty of both as a fraction (k = 1); they share one cause, so they err together */
  readonly relativeUncertainty: number;
  readonly grounds: Exclude<Grounds, 'none'>;
  /**
   * The part of `relativeUncertainty` that is a limit rather than a spread (a maker's tolerance):
   * its half-width as a fraction. With it a 95 % interval can be exact; without it everything counts
   * as normal, and the interval comes out somewhat too wide, never too narrow.
   */
  readonly limitFraction?: number;
}
