import type { Knex } from 'knex';

/** When a link was opened, and nothing of who opened it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists client_link_openings (
      number bigint unsigned not null auto_increment,
      link_id char(36) character set ascii collate ascii_bin not null,
      opened_at datetime(3) not null default current_timestamp(3),
      primary key (number),
      key client_link_openings_link (link_id, number),
      constraint client_link_openings_link foreign key (link_id) references client_links (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists client_link_openings');
}
