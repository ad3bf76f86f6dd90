import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists client_links (
      id char(36) character set ascii collate ascii_bin not null,
      notebook_id char(36) character set ascii collate ascii_bin not null,
      token_hash char(64) character set ascii collate ascii_bin not null,
      label varchar(120) null,
      created_by char(36) character set ascii collate ascii_bin not null,
      created_at datetime(3) not null default current_timestamp(3),
      revoked_at datetime(3) null,
      opened_count int unsigned not null default 0,
      last_opened_at datetime(3) null,
      primary key (id),
      unique key client_links_token (token_hash),
      key client_links_notebook (notebook_id),
      key client_links_creator (created_by),
      constraint client_links_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint client_links_creator foreign key (created_by) references users (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists client_links');
}
