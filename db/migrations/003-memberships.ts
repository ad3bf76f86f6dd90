import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists memberships (
      workshop_id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      role enum('admin', 'member') character set ascii not null,
      created_at datetime(3) not null default current_timestamp(3),
      primary key (workshop_id, user_id),
      key memberships_user (user_id),
      constraint memberships_workshop foreign key (workshop_id) references workshops (id) on delete cascade,
      constraint memberships_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists memberships');
}
