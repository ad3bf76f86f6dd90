import type { Knex } from 'knex';

/** Links of before point at the latest issued revision, for ever, without a passphrase. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table client_links
      -- Null: the latest issued one.
      add column if not exists revision int unsigned null,
      add column if not exists expires_at datetime(3) null,
      -- Argon2id; null where none is asked for.
      add column if not exists passphrase_hash varchar(200) character set ascii collate ascii_bin null,
      add column if not exists client_name varchar(120) null,
      add column if not exists client_email varchar(254) character set utf8mb4 collate utf8mb4_bin null
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table client_links
      drop column if exists revision,
      drop column if exists expires_at,
      drop column if exists passphrase_hash,
      drop column if exists client_name,
      drop column if exists client_email
  `);
}
