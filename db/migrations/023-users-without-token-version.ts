import type { Knex } from 'knex';

/** Sessions have a table of their own now; a session begun before that has to be begun anew. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw('alter table users drop column if exists token_version');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(
    'alter table users add column if not exists token_version int unsigned not null default 0 after password_hash',
  );
}
