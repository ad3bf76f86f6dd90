import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists version_words (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      -- The words say how the version to_number differs from from_number; versions never change, so neither do they.
      from_number int unsigned not null,
      to_number int unsigned not null,
      -- In which wording; rows of an older wording are written anew.
      form smallint unsigned not null,
      words json not null,
      primary key (notebook_id, to_number, from_number),
      constraint version_words_notebook foreign key (notebook_id) references notebooks (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists version_words');
}
