import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists revisions (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      -- 1 is revision A, 26 is Z, 27 is AA.
      ordinal int unsigned not null,
      letter varchar(8) character set ascii collate ascii_bin not null,
      version int unsigned not null,
      purpose varchar(120) not null,
      note varchar(1000) null,
      -- The names beside the ids are those of the day of issue, which people may change later.
      issued_by char(36) character set ascii collate ascii_bin not null,
      issued_by_name varchar(120) not null,
      issued_at datetime(3) not null default current_timestamp(3),
      checked_by char(36) character set ascii collate ascii_bin null,
      checked_by_name varchar(120) null,
      engine varchar(40) character set ascii collate ascii_bin not null,
      -- SHA-256 of the version's content, settings and all, as it was when it was issued.
      content_hash char(64) character set ascii collate ascii_bin not null,
      title_block json not null,
      -- The results of the dimension cells, by the result schema.
      results json not null,
      -- SHA-256 of all that is frozen; the check code on paper is its beginning.
      frozen_hash char(64) character set ascii collate ascii_bin not null,
      primary key (notebook_id, ordinal),
      unique key revisions_letter (notebook_id, letter),
      key revisions_version (notebook_id, version),
      key revisions_issuer (issued_by),
      key revisions_checker (checked_by),
      constraint revisions_ordinal check (ordinal > 0),
      -- A revision goes with its whole notebook or not at all: triggers refuse to delete it by itself.
      constraint revisions_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint revisions_version foreign key (notebook_id, version) references versions (notebook_id, number) on delete cascade,
      constraint revisions_issuer foreign key (issued_by) references users (id),
      constraint revisions_checker foreign key (checked_by) references users (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists revisions');
}
