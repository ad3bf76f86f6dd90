import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists presence (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      seen_at datetime(3) not null default current_timestamp(3),
      -- The cell in hand, if one is.
      cell_id varchar(40) character set ascii collate ascii_bin null,
      -- The newest version that this person has had on the screen.
      seen_version int unsigned not null default 0,
      primary key (notebook_id, user_id),
      key presence_user (user_id),
      constraint presence_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint presence_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists presence');
}
