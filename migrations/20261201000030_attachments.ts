import type { Knex } from "knex";

/**
 * Files as they were read in. A copy of a notebook keeps the ids that its document names, so an id is one within its
 * notebook only. The same file under the same name is kept once.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table attachments (
      notebook_id uuid not null references notebooks on delete cascade,
      id uuid not null default gen_random_uuid(),
      sha256 bytea not null check (length(sha256) = 32),
      name text not null check (length(name) between 1 and 200),
      media_type text not null,
      bytes bytea not null,
      size integer not null check (size between 1 and 10000000 and size = length(bytes)),
      uploaded_by uuid references people on delete set null,
      created_at timestamptz not null default now(),
      primary key (notebook_id, id),
      unique (notebook_id, sha256, name)
    );
    create index attachments_created on attachments (created_at);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop table attachments");
}
