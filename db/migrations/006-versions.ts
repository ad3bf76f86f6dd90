import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists versions (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      number int unsigned not null,
      -- No cascade: who saved a version stays on record as long as the version does.
      author_id char(36) character set ascii collate ascii_bin not null,
      saved_at datetime(3) not null default current_timestamp(3),
      note varchar(500) null,
      restored_from int unsigned null,
      content json not null,
      content_hash char(64) character set ascii collate ascii_bin not null,
      primary key (notebook_id, number),
      key versions_author (author_id),
      constraint versions_number check (number > 0),
      constraint versions_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint versions_author foreign key (author_id) references users (id),
      constraint versions_restored foreign key (notebook_id, restored_from) references versions (notebook_id, number)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists versions');
}
