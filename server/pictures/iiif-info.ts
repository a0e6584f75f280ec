import { type Licence, licenceUri } from '../../shared/contracts/common.js';
import { MAX_AREA } from './iiif-request.js';
import { TILE_PX } from './make-renditions.js';

/** The description of a picture by which viewers ask for tiles. */
export interface IiifInfo {
  readonly [key: string]: unknown;
}

/**
 * @param id     the URI that it is asked by, without `/info.json`
 * @param levels pages of the access copy, largest first
 * @see IIIF Image API 3.0, §5
 */
export function iiifInfo(input: {
  readonly id: string;
  readonly width: number;
  readonly height: number;
  readonly levels: readonly { readonly width: number; readonly height: number }[];
  readonly licence: Licence;
}): IiifInfo {
  const { id, width, height, levels, licence } = input;
  const rights = licenceUri(licence);
  return {
    '@context': 'http://iiif.io/api/image/3/context.json',
    id,
    type: 'ImageService3',
    protocol: 'http://iiif.io/api/image',
    profile: 'level2',
    width,
    height,
    maxArea: MAX_AREA,
    sizes: levels.filter((level) => level.width * level.height <= MAX_AREA).reverse(),
    tiles: [{ width: TILE_PX, height: TILE_PX, scaleFactors: levels.map((_, page) => 2 ** page) }],
    ...(rights !== null && { rights }),
    extraFormats: ['webp'],
    extraQualities: ['color', 'gray', 'bitonal'],
    extraFeatures: ['mirroring', 'sizeUpscaling'],
  };
}
