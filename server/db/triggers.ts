import type { Knex } from 'knex';

/**
 * What the database itself keeps true: that the gallery says nothing any more of what was just hidden, and the
 * revision by which rendered pages are kept.
 *
 * A find's entries are taken out in the transaction that changes anything said in them, so that nothing leaks
 * for a moment, and the find is noted in `gallery_pending`; `search.ts` puts what is public back, in batches,
 * before the gallery is next read.
 *
 * These are no migrations: a step that rebuilds a table loses the table's triggers and stumbles over those of
 * others. So they are taken off before any step and put on after the last, as they stand here.
 */
export async function takeTriggersOff(knex: Knex): Promise<void> {
  for (const name of (await knex('sqlite_master').where({ type: 'trigger' }).pluck('name')) as string[]) {
    await knex.raw('drop trigger ??', [name]);
  }
}

/**
 * Does nothing where they are on already, word for word; else puts them on and has everything that they watch
 * over looked at again. Before the step that makes the gallery's tables there is nothing to watch over.
 */
export async function putTriggersOn(knex: Knex): Promise<void> {
  if (!(await knex.schema.hasTable('gallery_pending'))) return;
  const present = new Set((await knex('sqlite_master').where({ type: 'trigger' }).pluck('sql')) as string[]);
  const wanted = [...GALLERY_TRIGGERS, ...revisionTriggers()];
  if (present.size === wanted.length && wanted.every((sql) => present.has(sql))) return;
  await knex.transaction(async (trx) => {
    await takeTriggersOff(trx);
    for (const statement of wanted) await trx.raw(statement);
    await trx.raw('insert into gallery_pending select id from finds where true on conflict do nothing');
    await trx('counters').where({ name: 'public-revision' }).increment('value', 1);
  });
}

/** Takes the entries of some finds out and has them looked at again. */
const again = (finds: string): string =>
  `delete from gallery_entries where find_id in (${finds});
   insert into gallery_pending select id from (select id from finds where id in (${finds})) where true on conflict do nothing;`;

const OF_OBSERVATIONS = (ids: string): string => `select find_id from observations where id in (${ids})`;
const NAMED = 'select id from finds where standing_id is not null';

const GALLERY_TRIGGERS = [
  `CREATE TRIGGER gallery_entry_gone after delete on gallery_entries begin
     delete from gallery_search where rowid = old.entry; end`,
  `CREATE TRIGGER gallery_find_made after insert on finds begin ${again('new.id')} end`,
  `CREATE TRIGGER gallery_find_changed after update of visibility, held_until, standing_id, public_words, owner_id on finds
     begin ${again('new.id')} end`,
  `CREATE TRIGGER gallery_find_gone after delete on finds begin
     delete from gallery_entries where find_id = old.id; delete from gallery_pending where find_id = old.id; end`,
  `CREATE TRIGGER gallery_observation_changed after update of find_id, observer_id, substrate on observations
     begin ${again('old.find_id, new.find_id')} end`,
  `CREATE TRIGGER gallery_observation_gone after delete on observations begin ${again('old.find_id')} end`,
  `CREATE TRIGGER gallery_image_made after insert on images when new.observation_id is not null
     begin ${again(OF_OBSERVATIONS('new.observation_id'))} end`,
  `CREATE TRIGGER gallery_image_changed after update of observation_id, role, state, light, uploaded_at on images
     when old.observation_id is not null or new.observation_id is not null
     begin ${again(OF_OBSERVATIONS('old.observation_id, new.observation_id'))} end`,
  `CREATE TRIGGER gallery_image_gone after delete on images begin
     delete from gallery_entries where image_id = old.id; end`,
  `CREATE TRIGGER gallery_series_made after insert on series begin ${again('new.find_id')} end`,
  `CREATE TRIGGER gallery_series_changed after update of structure, find_id on series
     begin ${again('old.find_id, new.find_id')} end`,
  `CREATE TRIGGER gallery_series_gone after delete on series begin ${again('old.find_id')} end`,
  `CREATE TRIGGER gallery_synonym_made after insert on taxa when new.accepted_id is not null begin ${again(NAMED)} end`,
  `CREATE TRIGGER gallery_name_changed after update of name, accepted_id, parent_id on taxa begin ${again(NAMED)} end`,
  `CREATE TRIGGER gallery_person_changed after update of name on users
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
      `CREATE TRIGGER public_${table}_made after insert on ${table} ${condition(insertWhen)} ${bump}`,
      `CREATE TRIGGER public_${table}_changed after update ${of === undefined ? '' : `of ${of}`} on ${table} ${condition(when)} ${bump}`,
      `CREATE TRIGGER public_${table}_gone after delete on ${table} ${bump}`,
    ]),
    `CREATE TRIGGER public_person_changed after update of name on users ${bump}`,
  ];
}
