import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists evaluation_cache (
      cache_key char(64) character set ascii collate ascii_bin not null,
      answer json not null,
      created_at datetime(3) not null default current_timestamp(3),
      primary key (cache_key),
      key evaluation_cache_age (created_at)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists evaluation_cache');
}
