import type { ImageTile } from '../../shared/contracts/images.js';
import type { Scale } from '../../shared/scale/scale.js';
import type { ReadyImage } from '../db/images.js';

/** The least that a page needs to show a picture with its bar. */
export function toImageTile(image: ReadyImage, scale: Scale | null): ImageTile {
  return {
    id: image.id,
    revision: image.revision,
    width: image.width,
    height: image.height,
    altText: image.altText,
    colours: [...image.colours],
    renditionWidths: [...image.renditionWidths],
    scale: scale && {
      umPerPxX: scale.umPerPxX,
      umPerPxY: scale.umPerPxY,
      relativeUncertainty: scale.relativeUncertainty,
      grounds: scale.grounds,
    },
  };
}
