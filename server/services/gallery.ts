import * as z from 'zod/mini';
import type { GalleryPage, GalleryQuery, GalleryTile } from '../../shared/contracts/gallery.js';
import { type Clock, today } from '../clock.js';
import type { GalleryTable } from '../db/gallery.js';
import type { GallerySearch, PagePlace } from '../db/search.js';
import { Invalid } from '../problem.js';

/** The pictures that everybody may see; the same for all who ask, signed in or not. */
export class GalleryService {
  constructor(
    private readonly search: GallerySearch,
    private readonly gallery: GalleryTable,
    private readonly clock: Clock,
  ) {}

  /** @throws {Invalid} `not-a-place` for an `after` that no page gave out */
  async page(query: GalleryQuery): Promise<GalleryPage> {
    const day = today(this.clock);
    await this.search.refresh(day);
    const { imageIds, total, next } = await this.search.page({
      limit: query.limit,
      ...(query.taxon !== undefined && { taxonId: query.taxon }),
      ...(query.q !== undefined && { words: query.q }),
      ...(query.after !== undefined && { after: readPlace(query.after) }),
    });
    return { tiles: await this.gallery.tiles(imageIds, day), total, next: next && writePlace(next) };
  }

  /** the newest pictures of a taxon and everything below it */
  async ofTaxon(taxonId: string, limit: number): Promise<GalleryTile[]> {
    return (await this.page({ taxon: taxonId, limit })).tiles;
  }

  async picturesByTaxon(): Promise<Map<string | null, number>> {
    await this.search.refresh(today(this.clock));
    return this.search.picturesByTaxon();
  }
}

const Place = z.tuple([z.iso.datetime(), z.uuid()]);

function writePlace({ uploadedAt, imageId }: PagePlace): string {
  return Buffer.from(JSON.stringify([uploadedAt, imageId])).toString('base64url');
}

function readPlace(text: string): PagePlace {
  try {
    const [uploadedAt, imageId] = Place.parse(JSON.parse(Buffer.from(text, 'base64url').toString('utf8')));
    return { uploadedAt, imageId };
  } catch {
    // what others made up is neither JSON nor a place; nothing tells beforehand
    throw new Invalid([{ pointer: '#/after', code: 'not-a-place', detail: 'No page ended there.' }]);
  }
}
