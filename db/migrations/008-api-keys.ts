import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists api_keys (
      id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      label varchar(120) not null,
      key_hash char(64) character set ascii collate ascii_bin not null,
      -- The visible end of the key, enough to tell two keys apart.
      fragment varchar(16) character set ascii collate ascii_bin not null,
      scopes json not null,
      created_at datetime(3) not null default current_timestamp(3),
      expires_at datetime(3) null,
      last_used_at datetime(3) null,
      revoked_at datetime(3) null,
      primary key (id),
      unique key api_keys_hash (key_hash),
      key api_keys_user (user_id),
      constraint api_keys_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists api_keys');
}
