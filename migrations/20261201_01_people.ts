import type { Knex } from 'knex';

/** People, their sign-in, invitations and resets, sessions, outgoing mail, jobs. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('users', (t) => {
    t.text('id').primary();
    t.text('email').notNullable().unique();
    t.text('name').notNullable();
    t.text('role').notNullable();
    t.text('password_hash').notNullable();
    t.text('credit_line').notNullable();
    t.text('default_licence').notNullable();
    t.float('fingertip_mm');
    t.text('portrait');
    t.text('created_at').notNullable();
    t.text('last_seen_at');
  });
  /** Invitations and password resets: only the token's hash is kept. */
  await knex.schema.createTable('tokens', (t) => {
    t.text('id').primary();
    t.text('kind').notNullable(); // invitation | reset
    t.text('token_hash').notNullable().unique();
    t.text('email').notNullable();
    t.text('role'); // invitation
    t.text('user_id').references('users.id').onDelete('CASCADE'); // reset
    t.text('made_by').references('users.id').onDelete('SET NULL');
    t.text('created_at').notNullable();
    t.text('expires_at').notNullable();
    t.text('used_at');
  });
  await knex.schema.createTable('sessions', (t) => {
    t.text('sid').primary();
    t.text('user_id').references('users.id').onDelete('CASCADE');
    t.text('data').notNullable();
    t.text('expires_at').notNullable().index();
  });
  await knex.schema.createTable('mails', (t) => {
    t.text('id').primary();
    t.text('to').notNullable();
    t.text('subject').notNullable();
    t.text('text').notNullable();
    t.text('html').notNullable();
    t.text('created_at').notNullable();
    t.text('sent_at');
    t.integer('attempts').notNullable().defaultTo(0);
    t.text('last_error');
  });
  await knex.schema.createTable('jobs', (t) => {
    t.text('id').primary();
    t.text('kind').notNullable();
    t.text('about').notNullable(); // the id of what it works on
    t.text('payload').notNullable();
    t.text('state').notNullable(); // waiting | working | done | failed
    t.integer('attempts').notNullable().defaultTo(0);
    t.text('run_after').notNullable();
    t.text('leased_until');
    t.text('last_error');
    t.text('created_at').notNullable();
    t.text('finished_at');
    t.index(['state', 'run_after']);
    t.index(['about', 'kind']);
  });
  /** Small named numbers: the next find number, the revision of what is public. */
  await knex.schema.createTable('counters', (t) => {
    t.text('name').primary();
    t.integer('value').notNullable();
  });
  await knex('counters').insert([
    { name: 'find-number', value: 0 },
    { name: 'public-revision', value: 0 },
  ]);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['counters', 'jobs', 'mails', 'sessions', 'tokens', 'users']) {
    await knex.schema.dropTable(table);
  }
}
