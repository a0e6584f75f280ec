import type { Knex } from 'knex';
import type { NameView } from '../../shared/contracts/common.js';
import type { GalleryTile } from '../../shared/contracts/gallery.js';
import { VISITOR } from '../../shared/permission/can.js';
import type { Database } from './database.js';
import { type TileColumns, toTile, withTiles } from './tiles.js';
import { visibleTo } from './visible-to.js';

interface Row extends TileColumns {
  title: string;
  light: string;
  credit_line: string;
  licence: GalleryTile['licence'];
  find_id: string;
  prefix: string;
  number: number;
  public_words: string;
  taxon_id: string | null;
  name: string | null;
  authorship: string | null;
  rank: string | null;
  code: NameView['code'] | null;
  qualifier: string | null;
}

/** Public pictures as the gallery shows them. */
export class GalleryTable {
  constructor(private readonly db: Database) {}

  /**
   * Tiles of these pictures, in their order. What is not public is left out, also when the search, which
   * should not know of it, names it.
   * @param day today's UTC date, for finds held until a date
   */
  async tiles(imageIds: readonly string[], day: string): Promise<GalleryTile[]> {
    const query = this.db
      .read('images')
      .join('observations', 'observations.id', 'images.observation_id')
      .join('finds', 'finds.id', 'observations.find_id')
      .leftJoin('determinations', 'determinations.id', 'finds.standing_id')
      .whereIn('images.id', imageIds)
      .where({ 'images.state': 'ready', 'images.role': 'subject' })
      .where(visibleTo(VISITOR, day))
      .select(
        'images.title',
        'images.light',
        'images.credit_line',
        'images.licence',
        'finds.prefix',
        'finds.number',
        'finds.public_words',
        'determinations.taxon_id',
        'determinations.name',
        'determinations.authorship',
        'determinations.rank',
        'determinations.code',
        'determinations.qualifier',
        { find_id: 'finds.id' },
      );
    const rows = (await (withTiles(query) as Knex.QueryBuilder)) as Row[];
    const byId = new Map(rows.map((row) => [row.tile_id, row]));
    return imageIds.flatMap((id) => {
      const row = byId.get(id);
      return row ? [toGalleryTile(row)] : [];
    });
  }
}

function toGalleryTile(row: Row): GalleryTile {
  return {
    ...toTile(row),
    title: row.title,
    light: row.light,
    findId: row.find_id,
    findNumber: `${row.prefix}-${row.number}`,
    taxonId: row.taxon_id,
    name: toName(row),
    publicPlace: row.public_words,
    creditLine: row.credit_line,
    licence: row.licence,
  };
}

/** The name of a joined determination; null where none was joined. */
export function toName(row: Pick<Row, 'name' | 'authorship' | 'rank' | 'code' | 'qualifier'>): NameView | null {
  const { name, authorship, rank, code, qualifier } = row;
  if (name === null || authorship === null || rank === null || code === null || qualifier === null) return null;
  return { name, authorship, rank, code, qualifier };
}
