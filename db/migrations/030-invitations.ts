import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table if not exists invitations (
      id char(36) character set ascii collate ascii_bin not null,
      workshop_id char(36) character set ascii collate ascii_bin not null,
      -- Null for an invitation to the workshop itself.
      notebook_id char(36) character set ascii collate ascii_bin null,
      role enum('admin', 'member', 'owner', 'editor', 'viewer') character set ascii not null,
      email varchar(254) character set utf8mb4 collate utf8mb4_bin not null,
      token_hash char(64) character set ascii collate ascii_bin not null,
      invited_by char(36) character set ascii collate ascii_bin null,
      made_at datetime(3) not null default current_timestamp(3),
      sent_at datetime(3) not null default current_timestamp(3),
      sent_count int unsigned not null default 1,
      expires_at datetime(3) not null,
      accepted_at datetime(3) null,
      withdrawn_at datetime(3) null,
      primary key (id),
      unique key invitations_token (token_hash),
      key invitations_workshop (workshop_id, notebook_id),
      key invitations_notebook (notebook_id),
      key invitations_email (email),
      key invitations_inviter (invited_by),
      constraint invitations_role check ((notebook_id is null) = (role in ('admin', 'member'))),
      constraint invitations_email_lower check (email = lower(email)),
      constraint invitations_workshop foreign key (workshop_id) references workshops (id) on delete cascade,
      constraint invitations_notebook foreign key (notebook_id) references notebooks (id) on delete cascade,
      constraint invitations_inviter foreign key (invited_by) references users (id) on delete set null
    ) engine = InnoDB default character set utf8mb4 collate utf8mb4_unicode_ci
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table if exists invitations');
}
