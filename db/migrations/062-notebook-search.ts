import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists notebook_search (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      -- The version whose text this is; older than the head only until the next start.
      version int unsigned not null,
      title varchar(200) not null,
      -- The sources of all cells one after another, a record separator (U+001E) between two.
      body mediumtext not null,
      -- The ids of those cells in the same order, a blank between two.
      cells mediumtext character set ascii collate ascii_bin not null,
      primary key (notebook_id),
      fulltext key notebook_search_words (title, body),
      constraint notebook_search_notebook foreign key (notebook_id) references notebooks (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists notebook_search');
}
