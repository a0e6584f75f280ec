import type { Knex } from 'knex';

/**
 * The gallery's narrow table and its full text, which hold only what everybody may see, and the revision of
 * what is public.
 *
 * Triggers take a find's entries out in the transaction that changes anything said in them, so that nothing
 * can leak for a moment, and note the find in `gallery_pending`; `server/db/search.ts` puts what is public
 * back in batches before the gallery is next read.
 *
 * A later migration that rebuilds one of these tables (Knex's `alter()`) loses the table's triggers and must
 * make them again.
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
  for (const statement of [...GALLERY_TRIGGERS, ...revisionTriggers()]) await knex.raw(statement);
  /** the last day, YYYYMMDD, whose finds held until then were put in */
  await knex('counters').insert({ name: 'gallery-day', value: 0 });
  await knex.raw('insert into gallery_pending select id from finds');
}

export async function down(knex: Knex): Promise<void> {
  const names = (await knex('sqlite_master')
    .where({ type: 'trigger' })
    .where((ours) => ours.where('name', 'like', 'gallery_%').orWhere('name', 'like', 'public_%'))
    .pluck('name')) as string[];
  for (const name of names) await knex.raw('drop trigger ??', [name]);
  await knex.schema.dropTable('gallery_search');
  await knex.schema.dropTable('gallery_pending');
  await knex.schema.dropTable('gallery_entries');
  await knex('counters').where({ name: 'gallery-day' }).delete();
}

/** Takes the entries of some finds out and has them looked at again. */
const again = (finds: string): string =>
  `delete from gallery_entries where find_id in (${finds});
   insert into gallery_pending select id from (select id from finds where id in (${finds})) where true on conflict do nothing;`;

const OF_OBSERVATIONS = (ids: string): string => `select find_id from observations where id in (${ids})`;
const NAMED = 'select id from finds where standing_id is not null';

const GALLERY_TRIGGERS = [
  `create trigger gallery_entry_gone after delete on gallery_entries begin
     delete from gallery_search where rowid = old.entry; end`,
  `create trigger gallery_find_made after insert on finds begin ${again('new.id')} end`,
  `create trigger gallery_find_changed after update of visibility, held_until, standing_id, public_words, owner_id on finds
     begin ${again('new.id')} end`,
  `create trigger gallery_find_gone after delete on finds begin
     delete from gallery_entries where find_id = old.id; delete from gallery_pending where find_id = old.id; end`,
  `create trigger gallery_observation_changed after update of find_id, observer_id, substrate on observations
     begin ${again('old.find_id, new.find_id')} end`,
  `create trigger gallery_observation_gone after delete on observations begin ${again('old.find_id')} end`,
  `create trigger gallery_image_made after insert on images when new.observation_id is not null
     begin ${again(OF_OBSERVATIONS('new.observation_id'))} end`,
  `create trigger gallery_image_changed after update of observation_id, role, state, light, uploaded_at on images
     when old.observation_id is not null or new.observation_id is not null
     begin ${again(OF_OBSERVATIONS('old.observation_id, new.observation_id'))} end`,
  `create trigger gallery_image_gone after delete on images begin
     delete from gallery_entries where image_id = old.id; end`,
  `create trigger gallery_series_made after insert on series begin ${again('new.find_id')} end`,
  `create trigger gallery_series_changed after update of structure, find_id on series
     begin ${again('old.find_id, new.find_id')} end`,
  `create trigger gallery_series_gone after delete on series begin ${again('old.find_id')} end`,
  `create trigger gallery_synonym_made after insert on taxa when new.accepted_id is not null begin ${again(NAMED)} end`,
  `create trigger gallery_name_changed after update of name, accepted_id, parent_id on taxa begin ${again(NAMED)} end`,
  `create trigger gallery_person_changed after update of name on users
     begin ${again('select id from finds where owner_id = new.id union select find_id from observations where observer_id = new.id')} end`,
];

/** What a public page is drawn from, by table: the columns that show (all where none are named), and when it counts. */
const SHOWN: readonly { table: string; of?: string; insertWhen?: string; when?: string }[] = [
  {
    table: 'finds',
    of: `prefix, number, owner_id, visibility, held_until, fruit_bodies, standing_id, sensitivity, public_words,
         public_latitude, public_longitude, public_uncertainty_m`,
  },
  { table: 'observations' },
  { table: 'preparations' },
  { table: 'determinations' },
  { table: 'taxa' },
  { table: 'published_sizes' },
  { table: 'series' },
  { table: 'notes' },
  { table: 'measurement_values' },
  {
    table: 'images',
    of: `observation_id, preparation_id, state, revision, width, height, role, light, title, alt_text, licence,
         credit_line, colours, rendition_widths, current_scale_id`,
    insertWhen: 'new.observation_id is not null',
    when: 'old.observation_id is not null or new.observation_id is not null',
  },
  {
    table: 'image_scales',
    insertWhen: 'exists (select 1 from images where id = new.image_id and observation_id is not null)',
  },
];

/** Each raises `public-revision`, by which rendered pages are kept. */
function revisionTriggers(): string[] {
  const bump = `begin update counters set value = value + 1 where name = 'public-revision'; end`;
  const condition = (when: string | undefined): string => (when === undefined ? '' : `when ${when}`);
  return [
    ...SHOWN.flatMap(({ table, of, insertWhen, when }) => [
      `create trigger public_${table}_made after insert on ${table} ${condition(insertWhen)} ${bump}`,
      `create trigger public_${table}_changed after update ${of === undefined ? '' : `of ${of}`} on ${table} ${condition(when)} ${bump}`,
      `create trigger public_${table}_gone after delete on ${table} ${bump}`,
    ]),
    `create trigger public_person_changed after update of name on users ${bump}`,
  ];
}
