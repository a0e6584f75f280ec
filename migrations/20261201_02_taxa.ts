import type { Knex } from 'knex';

/** Names and what books say of their sizes. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('taxa', (t) => {
    t.text('id').primary();
    t.text('name').notNullable();
    t.text('authorship').notNullable();
    t.text('rank').notNullable();
    t.text('code').notNullable(); // botanical | zoological
    t.text('parent_id').references('taxa.id').index();
    t.text('accepted_id').references('taxa.id').index(); // set for a synonym
    t.text('created_by');
    t.text('created_at').notNullable();
    t.unique(['name', 'authorship', 'rank']);
  });
  await knex.schema.createTable('published_sizes', (t) => {
    t.text('id').primary();
    t.text('taxon_id').notNullable().references('taxa.id').onDelete('CASCADE').index();
    t.text('structure').notNullable();
    t.text('dimension').notNullable(); // length | width
    t.float('min_um').notNullable();
    t.float('max_um').notNullable();
    t.text('kind'); // whole range | central range | mean | about; null: the book does not say
    t.integer('n');
    t.text('medium');
    t.text('ornament');
    t.text('source').notNullable();
    t.integer('year');
    t.text('page').notNullable();
    t.boolean('seen').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTable('published_sizes');
  await knex.schema.dropTable('taxa');
}
