import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists sessions (
      id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      -- Browser and system in words, so that a person knows the session again; no network address.
      device varchar(80) not null,
      begun_at datetime(3) not null default current_timestamp(3),
      -- Roughly: written at most every few minutes.
      seen_at datetime(3) not null default current_timestamp(3),
      primary key (id),
      key sessions_user (user_id, seen_at),
      key sessions_age (seen_at),
      constraint sessions_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists sessions');
}
