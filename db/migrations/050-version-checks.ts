import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists version_checks (
      notebook_id char(36) character set ascii collate ascii_bin not null,
      version int unsigned not null,
      -- No cascade: who checked a version stays on record as long as the version does.
      person_id char(36) character set ascii collate ascii_bin not null,
      checked_at datetime(3) not null default current_timestamp(3),
      remark varchar(500) null,
      primary key (notebook_id, version, person_id),
      key version_checks_person (person_id),
      constraint version_checks_version foreign key (notebook_id, version) references versions (notebook_id, number) on delete cascade,
      constraint version_checks_person foreign key (person_id) references users (id)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists version_checks');
}
