import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists rate_limits (
      bucket varchar(190) character set utf8mb4 collate utf8mb4_bin not null,
      window_start datetime(3) not null,
      hits int unsigned not null,
      primary key (bucket, window_start),
      key rate_limits_age (window_start)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists rate_limits');
}
