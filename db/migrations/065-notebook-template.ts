import type { Knex } from 'knex';

/** Since when a notebook is a template of its workshop; null while it is none. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw('alter table notebooks add column if not exists template_since datetime(3) null');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table notebooks drop column if exists template_since');
}
