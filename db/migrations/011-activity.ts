import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists activity (
      number bigint unsigned not null auto_increment,
      at datetime(3) not null default current_timestamp(3),
      -- No foreign keys: the record outlives what it speaks of.
      workshop_id char(36) character set ascii collate ascii_bin null,
      notebook_id char(36) character set ascii collate ascii_bin null,
      -- Null where nobody is known: a wrong password, a client link that was opened.
      actor_id char(36) character set ascii collate ascii_bin null,
      deed varchar(40) character set ascii collate ascii_bin not null,
      -- What it was done to, as it was called then; never a name or an address of a person.
      subject varchar(300) not null,
      details json not null default '{}',
      primary key (number),
      key activity_workshop (workshop_id, number),
      key activity_actor (actor_id, number)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists activity');
}
