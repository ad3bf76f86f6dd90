import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists password_resets (
      token_hash char(64) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      made_at datetime(3) not null default current_timestamp(3),
      expires_at datetime(3) not null,
      primary key (token_hash),
      key password_resets_user (user_id),
      key password_resets_age (expires_at),
      constraint password_resets_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists password_resets');
}
