import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists notebooks (
      id char(36) character set ascii collate ascii_bin not null,
      workshop_id char(36) character set ascii collate ascii_bin not null,
      title varchar(200) not null,
      -- The number of the newest version; 0 until the first one is in.
      head int unsigned not null default 0,
      archived_at datetime(3) null,
      created_at datetime(3) not null default current_timestamp(3),
      changed_at datetime(3) not null default current_timestamp(3),
      primary key (id),
      key notebooks_workshop (workshop_id),
      constraint notebooks_workshop foreign key (workshop_id) references workshops (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists notebooks');
}
