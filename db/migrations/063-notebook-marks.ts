import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists notebook_marks (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      cell_id varchar(40) character set ascii collate ascii_bin not null,
      -- The line in the cell, from 1.
      line int unsigned not null,
      -- Compared sign by sign: R and r are two marks.
      mark varchar(100) character set utf8mb4 collate utf8mb4_bin not null,
      -- The line that defines it, cut where it is long.
      definition varchar(200) not null,
      primary key (notebook_id, cell_id, line),
      key notebook_marks_mark (mark, notebook_id),
      constraint notebook_marks_notebook foreign key (notebook_id) references notebooks (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists notebook_marks');
}
