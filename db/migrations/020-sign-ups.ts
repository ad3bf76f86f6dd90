import type { Knex } from 'knex';

/**
 * Sign-ups that wait for their e-mail address to be confirmed. No account exists before that, so an
 * address belongs to nobody until somebody has read a letter sent to it; and each sign-up keeps the
 * password it was made with, so that nobody confirms another one's by mistake.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists sign_ups (
      id char(36) character set ascii collate ascii_bin not null,
      token_hash char(64) character set ascii collate ascii_bin not null,
      email varchar(254) character set utf8mb4 collate utf8mb4_bin not null,
      name varchar(120) not null,
      workshop varchar(120) not null,
      password_hash varchar(255) character set ascii collate ascii_bin not null,
      made_at datetime(3) not null default current_timestamp(3),
      expires_at datetime(3) not null,
      primary key (id),
      unique key sign_ups_token (token_hash),
      key sign_ups_email (email, made_at),
      key sign_ups_age (expires_at),
      constraint sign_ups_email_lower check (email = lower(email))
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists sign_ups');
}
