import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists notebook_roles (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      role enum('owner', 'editor', 'viewer') character set ascii not null,
      created_at datetime(3) not null default current_timestamp(3),
      primary key (notebook_id, user_id),
      key notebook_roles_user (user_id),
      constraint notebook_roles_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint notebook_roles_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists notebook_roles');
}
