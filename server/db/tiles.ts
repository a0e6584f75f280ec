import type { Knex } from 'knex';
import type { ImageTile } from '../../shared/contracts/images.js';
import type { Grounds } from '../../shared/scale/scale.js';
import { toScale } from './scale-columns.js';

/** What a query must select for `toTile`; see `withTiles`. */
export interface TileColumns {
  tile_id: string;
  tile_revision: number;
  tile_width: number;
  tile_height: number;
  tile_alt_text: string;
  tile_colours: string;
  tile_rendition_widths: string;
  tile_grounds: Grounds | null;
  tile_um_per_px_x: number | null;
  tile_um_per_px_y: number | null;
  tile_relative_uncertainty: number | null;
}

/** Adds a tile's columns, and the current scale that its bar is drawn from, to a query that has `images` in it. */
export function withTiles(query: Knex.QueryBuilder): Knex.QueryBuilder {
  return query.leftJoin('image_scales as tile_scale', 'tile_scale.id', 'images.current_scale_id').select({
    tile_id: 'images.id',
    tile_revision: 'images.revision',
    tile_width: 'images.width',
    tile_height: 'images.height',
    tile_alt_text: 'images.alt_text',
    tile_colours: 'images.colours',
    tile_rendition_widths: 'images.rendition_widths',
    tile_grounds: 'tile_scale.grounds',
    tile_um_per_px_x: 'tile_scale.um_per_px_x',
    tile_um_per_px_y: 'tile_scale.um_per_px_y',
    tile_relative_uncertainty: 'tile_scale.relative_uncertainty',
  });
}

/** Of a picture whose intake is done; `scale` is null while there is none or its grounds are `none`. */
export function toTile(row: TileColumns): ImageTile {
  return {
    id: row.tile_id,
    revision: row.tile_revision,
    width: row.tile_width,
    height: row.tile_height,
    altText: row.tile_alt_text,
    colours: JSON.parse(row.tile_colours) as string[],
    renditionWidths: JSON.parse(row.tile_rendition_widths) as number[],
    scale: toScale({
      grounds: row.tile_grounds,
      um_per_px_x: row.tile_um_per_px_x,
      um_per_px_y: row.tile_um_per_px_y,
      relative_uncertainty: row.tile_relative_uncertainty,
    }),
  };
}
