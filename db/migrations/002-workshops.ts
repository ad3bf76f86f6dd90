import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists workshops (
      id char(36) character set ascii collate ascii_bin not null,
      name varchar(120) not null,
      defaults json not null default '{}',
      created_at datetime(3) not null default current_timestamp(3),
      primary key (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists workshops');
}
