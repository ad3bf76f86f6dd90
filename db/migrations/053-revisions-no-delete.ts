import type { Knex } from 'knex';

/** What was issued stays as it was issued; the database itself refuses to delete a revision. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create trigger if not exists revisions_no_delete before delete on revisions
    for each row signal sqlstate '45000' set message_text = 'An issued revision never changes.'
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop trigger if exists revisions_no_delete');
}
