import type { Knex } from 'knex';

/**
 * Files that people upload. They are few and small (a logo has at most 256 kB), so they live in the
 * database: one thing to back up, shared by all instances, stored in the same transaction as what
 * speaks of them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists attachments (
      workshop_id char(36) character set ascii collate ascii_bin not null,
      sha256 char(64) character set ascii collate ascii_bin not null,
      media_type varchar(40) character set ascii collate ascii_bin not null,
      width int unsigned not null,
      height int unsigned not null,
      bytes mediumblob not null,
      added_by char(36) character set ascii collate ascii_bin null,
      added_at datetime(3) not null default current_timestamp(3),
      primary key (workshop_id, sha256),
      key attachments_adder (added_by),
      constraint attachments_workshop foreign key (workshop_id) references workshops (id) on delete cascade,
      constraint attachments_adder foreign key (added_by) references users (id) on delete set null
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists attachments');
}
