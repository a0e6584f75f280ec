import type { PictureQuery } from '../../shared/contracts/images.js';
import type { ImageScaleTable } from '../db/image-scales.js';
import type { ImageSurroundingsTable } from '../db/image-surroundings.js';
import type { ReadyImage } from '../db/images.js';
import { pictureName } from '../exports/picture-name.js';
import { rightsNotes } from '../exports/rights-notes.js';
import { scaleBarOverlay } from '../exports/scale-bar-drawing.js';
import { carryAway, copySize } from '../pictures/carry-away.js';
import type { PictureFiles } from '../pictures/picture-files.js';
import type { PictureServer } from '../pictures/picture-server.js';

/** Wider copies take more memory than a download is worth. */
const WIDEST_PX = 8000;

/** Copies to carry away, with the bar drawn in and the licence written into the file. */
export class CarryAwayService {
  constructor(
    private readonly options: {
      readonly scales: ImageScaleTable;
      readonly surroundings: ImageSurroundingsTable;
      readonly pictures: PictureServer;
      readonly files: PictureFiles;
    },
  ) {}

  /** @param signal aborted when whoever asked has left */
  async copy(image: ReadyImage, query: PictureQuery, signal: AbortSignal): Promise<{ name: string; bytes: Buffer }> {
    const { scales, surroundings, pictures, files } = this.options;
    const size = copySize(image, query.width, WIDEST_PX);
    const version = image.currentScaleId === null ? null : await scales.find(image.currentScaleId);
    const overlay =
      query.bar === 'on' ? scaleBarOverlay({ picture: size, original: image, scale: version?.scale ?? null }) : null;
    const { find } = await surroundings.of(image);
    const levels = await pictures.levels(image);
    const bytes = await pictures.inQueue(
      () =>
        carryAway({
          access: files.accessCopy(image),
          ...{ levels, size, overlay, format: query.format },
          rights: rightsNotes(image.creditLine, image.licence),
        }),
      signal,
    );
    const name = pictureName({
      findNumber: find?.number ?? null,
      taxon: find?.name?.name ?? null,
      title: image.title,
      originalName: image.originalName,
      width: size.width,
      format: query.format,
    });
    return { name, bytes };
  }
}
