import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists comment_mentions (
      comment_id char(36) character set ascii collate ascii_bin not null,
      user_id char(36) character set ascii collate ascii_bin not null,
      primary key (comment_id, user_id),
      key comment_mentions_user (user_id),
      constraint comment_mentions_comment foreign key (comment_id) references comments (id) on delete cascade,
      constraint comment_mentions_user foreign key (user_id) references users (id) on delete cascade
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists comment_mentions');
}
