import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists comments (
      id char(36) character set ascii collate ascii_bin not null,
      notebook_id char(36) character set ascii collate ascii_bin not null,
      -- The comment that begins the thread; of that comment, its own id.
      thread_id char(36) character set ascii collate ascii_bin not null,
      -- No foreign key: a comment outlives the cell it is about.
      cell_id varchar(40) character set ascii collate ascii_bin not null,
      -- What the cell was called when the thread began, for when it is gone.
      cell_name varchar(120) not null,
      -- No cascade: who said something stays on record as long as it does.
      author_id char(36) character set ascii collate ascii_bin not null,
      -- Plain text; a person who is mentioned stands in it by id.
      body text not null,
      said_at datetime(6) not null default current_timestamp(6),
      edited_at datetime(6) null,
      withdrawn_at datetime(6) null,
      -- Of the comment that begins a thread.
      resolved_at datetime(6) null,
      resolved_by char(36) character set ascii collate ascii_bin null,
      changed_at datetime(6) not null default current_timestamp(6),
      primary key (id),
      key comments_notebook (notebook_id, changed_at),
      key comments_thread (thread_id),
      key comments_author (author_id),
      constraint comments_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint comments_thread foreign key (thread_id) references comments (id) on delete cascade,
      constraint comments_author foreign key (author_id) references users (id),
      constraint comments_resolver foreign key (resolved_by) references users (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists comments');
}
