import type { Grounds, Scale } from '../../shared/scale/scale.js';

/** Columns of `image_scales` that say what a pixel means. */
export interface ScaleColumns {
  readonly grounds: Grounds | null;
  readonly um_per_px_x: number | null;
  readonly um_per_px_y: number | null;
  readonly relative_uncertainty: number | null;
}

/** null where nobody has set a scale yet, and where its grounds are `none` */
export function toScale({
  grounds,
  um_per_px_x: umPerPxX,
  um_per_px_y: umPerPxY,
  relative_uncertainty: relativeUncertainty,
}: ScaleColumns): Scale | null {
  if (grounds === null || grounds === 'none') return null;
  if (umPerPxX === null || umPerPxY === null || relativeUncertainty === null) return null;
  return { grounds, umPerPxX, umPerPxY, relativeUncertainty };
}
