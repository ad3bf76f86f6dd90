import type { Knex } from 'knex';

/** The record is only ever added to; the database itself refuses to delete a line of it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create trigger if not exists activity_no_delete before delete on activity
    for each row signal sqlstate '45000' set message_text = 'The activity record is append-only.'
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop trigger if exists activity_no_delete');
}
