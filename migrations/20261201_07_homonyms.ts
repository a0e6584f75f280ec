import type { Knex } from 'knex';

/** A name may stand once under each code: *Trichia* is a slime mould and a snail. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('taxa', (t) => {
    t.dropUnique(['name', 'authorship', 'rank']);
    t.unique(['name', 'authorship', 'rank', 'code']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.alterTable('taxa', (t) => {
    t.dropUnique(['name', 'authorship', 'rank', 'code']);
    t.unique(['name', 'authorship', 'rank']);
  });
}
