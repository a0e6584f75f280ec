import type { Knex } from 'knex';

/**
 * The gallery's narrow table and its full text, which hold only what everybody may see. What keeps them true is
 * `server/db/triggers.ts`; `server/db/search.ts` fills them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('gallery_entries', (t) => {
    t.increments('entry'); // also the row of the full text
    t.text('image_id').notNullable().unique();
    t.text('find_id').notNullable().index();
    /** of the name that stands, synonyms resolved */
    t.text('taxon_id');
    t.text('uploaded_at').notNullable();
    t.index(['uploaded_at', 'image_id']);
    t.index(['taxon_id', 'uploaded_at', 'image_id']);
  });
  await knex.schema.createTable('gallery_pending', (t) => {
    t.text('find_id').primary();
  });
  await knex.raw(
    `create virtual table gallery_search using fts5(
       names, place, people, structures, surroundings,
       content = '', contentless_delete = 1, tokenize = 'unicode61 remove_diacritics 2', prefix = '2 3'
     )`,
  );
  /** the last day, YYYYMMDD, whose finds held until then were put in */
  await knex('counters').insert({ name: 'gallery-day', value: 0 });
  await knex.raw('insert into gallery_pending select id from finds');
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTable('gallery_search');
  await knex.schema.dropTable('gallery_pending');
  await knex.schema.dropTable('gallery_entries');
  await knex('counters').where({ name: 'gallery-day' }).delete();
}
