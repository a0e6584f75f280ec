import type { Knex } from 'knex';
import { VISITOR } from '../../shared/permission/can.js';
import type { Database } from './database.js';
import { type GalleryText, galleryTexts } from './search-texts.js';

/** Finds that are looked at again in one transaction. */
const BATCH = 200;

/** Where a page ended: the upload's instant and the id of its last picture. */
export interface PagePlace {
  readonly uploadedAt: string;
  readonly imageId: string;
}

/** Looking things up among the pictures that everybody may see. The only way to the full text. */
export interface GallerySearch {
  /**
   * Brings in what has become public; call it before reading.
   * @param day today's UTC date, for finds held until a date
   */
  refresh(day: string): Promise<void>;
  /**
   * One page of pictures, newest first.
   * @param taxonId a name, a synonym too: it and everything below it
   * @param words   each must begin some word said of the picture; none of them letters or digits: no picture
   */
  page(query: {
    readonly taxonId?: string;
    readonly words?: string;
    readonly after?: PagePlace;
    readonly limit: number;
  }): Promise<{ readonly imageIds: string[]; readonly total: number; readonly next: PagePlace | null }>;
  /** pictures of each accepted taxon, without those below it; null's are of finds without a name */
  picturesByTaxon(): Promise<Map<string | null, number>>;
}

interface Entry {
  image_id: string;
  uploaded_at: string;
}

/** The gallery's narrow table with its FTS5 full text; what keeps them true is told in the migration. */
export class SqliteGallerySearch implements GallerySearch {
  constructor(private readonly db: Database) {}

  async refresh(day: string): Promise<void> {
    if (!(await this.isBehind(day))) return;
    await this.db.write.transaction((trx) => this.lookAtNewDay(day, trx));
    while (await this.db.write.transaction((trx) => this.refreshBatch(day, trx)));
  }

  async page({
    taxonId,
    words,
    after,
    limit,
  }: Parameters<GallerySearch['page']>[0]): ReturnType<GallerySearch['page']> {
    const match = words === undefined || words === '' ? null : matchAll(words);
    if (words && match === null) return { imageIds: [], total: 0, next: null };
    const matching = (): Knex.QueryBuilder => {
      const query = this.db.read('gallery_entries');
      if (match !== null) {
        query.whereRaw('gallery_entries.entry in (select rowid from gallery_search where gallery_search match ?)', [
          match,
        ]);
      }
      if (taxonId !== undefined) query.whereRaw(`gallery_entries.taxon_id in (${BELOW})`, [taxonId]);
      return query;
    };
    const [counted] = (await matching().count({ total: '*' })) as { total: number }[];
    const query = matching()
      .select('image_id', 'uploaded_at')
      .limit(limit + 1);
    if (after) query.whereRaw('(uploaded_at, image_id) < (?, ?)', [after.uploadedAt, after.imageId]);
    const rows = (await query.orderBy([
      { column: 'uploaded_at', order: 'desc' },
      { column: 'image_id', order: 'desc' },
    ])) as Entry[];
    const shown = rows.slice(0, limit);
    const last = shown.at(-1);
    return {
      imageIds: shown.map((row) => row.image_id),
      total: counted?.total ?? 0,
      next: last && rows.length > limit ? { uploadedAt: last.uploaded_at, imageId: last.image_id } : null,
    };
  }

  async picturesByTaxon(): Promise<Map<string | null, number>> {
    const rows = (await this.db
      .read('gallery_entries')
      .groupBy('taxon_id')
      .select('taxon_id')
      .count({ pictures: '*' })) as { taxon_id: string | null; pictures: number }[];
    return new Map(rows.map((row) => [row.taxon_id, row.pictures]));
  }

  private async isBehind(day: string): Promise<boolean> {
    const [row] = (await this.db.read.raw(
      `select exists (select 1 from gallery_pending) as pending,
              (select value from counters where name = 'gallery-day') < ? as yesterday`,
      [dayNumber(day)],
    )) as { pending: number; yesterday: number }[];
    return row?.pending === 1 || row?.yesterday === 1;
  }

  /** Finds whose date has come change nothing in the database by themselves. */
  private async lookAtNewDay(day: string, trx: Knex.Transaction): Promise<void> {
    const counter = trx('counters').where({ name: 'gallery-day' });
    const { value: before } = (await counter.clone().first('value')) as { value: number };
    if (before >= dayNumber(day)) return;
    await counter.clone().update({ value: dayNumber(day) });
    const due = (await trx('finds')
      .where('visibility', 'held')
      .where('held_until', '<=', day)
      .whereRaw(`cast(replace(held_until, '-', '') as integer) > ?`, [before])
      .pluck('id')) as string[];
    if (due.length === 0) return;
    await trx.raw(`insert into gallery_pending select value from json_each(?) where true on conflict do nothing`, [
      JSON.stringify(due),
    ]);
    await trx('counters').where({ name: 'public-revision' }).increment('value', 1);
  }

  /** @returns whether more is waiting */
  private async refreshBatch(day: string, trx: Knex.Transaction): Promise<boolean> {
    const findIds = (await trx('gallery_pending').limit(BATCH).pluck('find_id')) as string[];
    if (findIds.length === 0) return false;
    await trx('gallery_entries').whereIn('find_id', findIds).delete();
    for (const text of await galleryTexts(findIds, VISITOR, day, trx)) await insertEntry(text, trx);
    await trx('gallery_pending').whereIn('find_id', findIds).delete();
    return findIds.length === BATCH;
  }
}

/** The taxon that a name stands for, everything below it, and their synonyms. */
const BELOW = `
  with recursive below(id) as (
    select coalesce(accepted_id, id) from taxa where id = ?
    union select taxa.id from below join taxa on taxa.parent_id = below.id
    union select taxa.id from below join taxa on taxa.accepted_id = below.id
  ) select id from below`;

async function insertEntry(text: GalleryText, trx: Knex.Transaction): Promise<void> {
  const [row] = (await trx('gallery_entries')
    .insert({
      image_id: text.imageId,
      find_id: text.findId,
      taxon_id: text.taxonId,
      uploaded_at: text.uploadedAt,
    })
    .returning('entry')) as { entry: number }[];
  await trx.raw(
    'insert into gallery_search (rowid, names, place, people, structures, surroundings) values (?, ?, ?, ?, ?, ?)',
    [row?.entry ?? null, text.names, text.place, text.people, text.structures, text.surroundings],
  );
}

/**
 * What FTS5 is asked: every word of the person's as the beginning of a word. Words are taken apart here as the
 * tokenizer does, and quoted, so that none of FTS5's own signs has a meaning.
 *
 * @returns null when there is no letter or digit in it
 */
export function matchAll(words: string): string | null {
  const tokens = words.match(/[\p{L}\p{N}\p{M}]+/gu) ?? [];
  return tokens.length === 0 ? null : tokens.map((token) => `"${token}"*`).join(' ');
}

/** `2026-03-01` as 20260301 */
function dayNumber(day: string): number {
  return Number(day.replaceAll('-', ''));
}
