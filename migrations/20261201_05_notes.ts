import type { Knex } from 'knex';

/** What is said and measured on pictures. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('series', (t) => {
    t.text('id').primary();
    t.text('find_id').notNullable().references('finds.id').onDelete('CASCADE').index();
    t.text('preparation_id').references('preparations.id').index();
    t.text('observer_id').notNullable().references('users.id');
    t.text('structure').notNullable();
    t.text('edge_rule').notNullable();
    t.boolean('ornament_included');
    t.text('created_at').notNullable();
  });
  /** Never two series of one observer for the same structure of the same preparation. */
  await knex.raw(
    `create unique index series_one on series (find_id, coalesce(preparation_id, ''), observer_id, structure)`,
  );
  await knex.schema.createTable('notes', (t) => {
    t.text('id').primary();
    t.text('image_id').notNullable().references('images.id').onDelete('CASCADE').index();
    t.text('layer').notNullable().references('users.id');
    t.text('kind').notNullable();
    t.text('series_id').references('series.id').index();
    t.text('geometry').notNullable(); // JSON
    t.text('text').notNullable();
    t.integer('last_seq').notNullable();
  });
  /** Append-only; `seq` is the server's order, `id` the client's, so that sending twice changes nothing. */
  await knex.schema.createTable('note_edits', (t) => {
    t.increments('seq');
    t.text('id').notNullable().unique();
    t.text('image_id').notNullable().references('images.id').onDelete('CASCADE').index();
    t.text('note_id').notNullable();
    t.text('author_id').notNullable().references('users.id');
    t.text('before'); // JSON
    t.text('after'); // JSON
    t.text('outcome').notNullable();
    t.text('created_at').notNullable();
  });
  /** A snapshot of what was drawn; superseded, never changed. */
  await knex.schema.createTable('measurements', (t) => {
    t.text('id').primary();
    t.text('series_id').notNullable().references('series.id').onDelete('CASCADE').index();
    t.text('note_id').notNullable().index();
    t.text('image_id').notNullable().references('images.id').onDelete('CASCADE').index();
    t.text('geometry').notNullable(); // JSON
    t.text('created_at').notNullable();
    t.text('superseded_at');
  });
  /** One row per value and scale version. `um` is null while the picture had no scale. */
  await knex.schema.createTable('measurement_values', (t) => {
    t.text('id').primary();
    t.text('measurement_id').notNullable().references('measurements.id').onDelete('CASCADE').index();
    t.text('image_scale_id').references('image_scales.id');
    t.text('dimension').notNullable(); // length | width
    t.float('px').notNullable();
    t.float('um');
    t.float('u'); // standard uncertainty, µm
    t.text('created_at').notNullable();
    t.text('superseded_at');
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['measurement_values', 'measurements', 'note_edits', 'notes', 'series']) {
    await knex.schema.dropTable(table);
  }
}
