import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists identities (
      -- Who vouches for the person, and what the person is called there: OpenID Connect's iss and sub.
      issuer varchar(255) character set ascii collate ascii_bin not null,
      subject varchar(255) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      linked_at datetime(3) not null default current_timestamp(3),
      primary key (issuer, subject),
      key identities_user (user_id),
      constraint identities_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists identities');
}
