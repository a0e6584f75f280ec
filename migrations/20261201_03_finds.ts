import type { Knex } from 'knex';

/** Finds, their observations and preparations, and the names given to them. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('finds', (t) => {
    t.text('id').primary();
    t.text('prefix').notNullable();
    t.integer('number').notNullable();
    t.text('owner_id').notNullable().references('users.id').index();
    t.text('visibility').notNullable(); // private | group | public | held
    t.text('held_until');
    t.integer('fruit_bodies').notNullable().defaultTo(1);
    /** the determination that stands */
    t.text('standing_id');
    t.text('sensitivity').notNullable();
    t.text('exact_words').notNullable();
    t.float('exact_latitude');
    t.float('exact_longitude');
    t.float('exact_uncertainty_m');
    t.text('public_words').notNullable();
    t.float('public_latitude');
    t.float('public_longitude');
    t.float('public_uncertainty_m');
    t.text('created_at').notNullable();
    t.unique(['prefix', 'number']);
    t.index(['visibility', 'created_at']);
  });
  await knex.schema.createTable('find_place_readers', (t) => {
    t.text('find_id').notNullable().references('finds.id').onDelete('CASCADE');
    t.text('user_id').notNullable().references('users.id').onDelete('CASCADE');
    t.primary(['find_id', 'user_id']);
  });
  await knex.schema.createTable('observations', (t) => {
    t.text('id').primary();
    t.text('find_id').notNullable().references('finds.id').onDelete('CASCADE').index();
    t.text('kind').notNullable();
    t.text('observed_on').notNullable(); // local date
    t.text('observer_id').notNullable().references('users.id');
    t.text('substrate').notNullable();
    t.text('remarks').notNullable();
    t.text('created_at').notNullable();
  });
  await knex.schema.createTable('preparations', (t) => {
    t.text('id').primary();
    t.text('observation_id').notNullable().references('observations.id').onDelete('CASCADE').index();
    t.text('title').notNullable();
    t.text('part').notNullable();
    t.text('medium').notNullable();
    t.text('stain').notNullable();
    t.text('condition').notNullable();
    t.text('created_at').notNullable();
  });
  await knex.schema.createTable('determinations', (t) => {
    t.text('id').primary();
    t.text('find_id').notNullable().references('finds.id').onDelete('CASCADE').index();
    t.text('taxon_id').notNullable().references('taxa.id').index();
    /** the name as it was given stays, whatever becomes of the taxon */
    t.text('name').notNullable();
    t.text('authorship').notNullable();
    t.text('rank').notNullable();
    t.text('code').notNullable();
    t.text('qualifier').notNullable();
    t.text('reason').notNullable();
    t.text('confidence').notNullable();
    t.text('by_id').notNullable().references('users.id');
    t.text('determined_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['determinations', 'preparations', 'observations', 'find_place_readers', 'finds']) {
    await knex.schema.dropTable(table);
  }
}
