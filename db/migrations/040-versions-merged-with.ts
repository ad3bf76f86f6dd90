import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table versions
      -- The version with which this save was brought together because it was made on an older one.
      add column if not exists merged_with int unsigned null
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table versions drop column if exists merged_with');
}
