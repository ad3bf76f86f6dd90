import type { Knex } from 'knex';

/** A link to one fixed revision can only point at one that its own notebook has. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table client_links
      add constraint client_links_revision foreign key if not exists client_links_revision (notebook_id, revision)
      references revisions (notebook_id, ordinal)
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table client_links drop foreign key if exists client_links_revision');
}
