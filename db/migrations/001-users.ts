import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists users (
      id char(36) character set ascii collate ascii_bin not null,
      -- Compared byte for byte, so that é and e stay two addresses; the check keeps it blind to case.
      email varchar(254) character set utf8mb4 collate utf8mb4_bin not null,
      name varchar(120) not null,
      password_hash varchar(255) character set ascii collate ascii_bin not null,
      -- Part of every session: raising it ends all sessions of the person.
      token_version int unsigned not null default 0,
      created_at datetime(3) not null default current_timestamp(3),
      primary key (id),
      unique key users_email (email),
      constraint users_email_lower check (email = lower(email))
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists users');
}
