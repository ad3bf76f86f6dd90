import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(
    `alter table notebooks add column if not exists title_block json not null default '{}'`,
  );
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table notebooks drop column if exists title_block');
}
