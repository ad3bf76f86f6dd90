import type { Knex } from 'knex';

/** From which notebook and version a copy came. No foreign key: a copy outlives its original. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table notebooks
      add column if not exists origin_id char(36) character set ascii collate ascii_bin null,
      add column if not exists origin_version int unsigned null
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table notebooks drop column if exists origin_version, drop column if exists origin_id
  `);
}
