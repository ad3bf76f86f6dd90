import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists outgoing_mail (
      id char(36) character set ascii collate ascii_bin not null,
      recipient varchar(254) character set utf8mb4 collate utf8mb4_bin not null,
      subject varchar(300) not null,
      -- The letter as data; text and HTML are written from it when it is sent.
      letter json not null,
      -- Two letters with the same key are one: the second is not queued.
      once_key varchar(190) character set ascii collate ascii_bin null,
      queued_at datetime(3) not null default current_timestamp(3),
      attempts int unsigned not null default 0,
      -- When it may next be tried; while one instance sends it, the end of its lease.
      due_at datetime(3) not null default current_timestamp(3),
      sent_at datetime(3) null,
      given_up_at datetime(3) null,
      last_fault varchar(300) null,
      primary key (id),
      unique key outgoing_mail_once (once_key),
      key outgoing_mail_due (sent_at, given_up_at, due_at)
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists outgoing_mail');
}
