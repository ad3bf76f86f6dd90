import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table versions
      -- Whether the sheet saved it by itself after a pause; what was saved before was kept by hand.
      add column if not exists by_itself boolean not null default false
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table versions drop column if exists by_itself');
}
