import type { Knex } from "knex";

/** Which server processes run, and which of them hold which notebooks open. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table server_processes (
      id uuid primary key,
      started_at timestamptz not null default now(),
      seen_at timestamptz not null default now()
    );

    create table notebook_holders (
      notebook_id uuid not null references notebooks on delete cascade,
      process_id uuid not null references server_processes on delete cascade,
      primary key (notebook_id, process_id)
    );
    create index notebook_holders_process on notebook_holders (process_id);

    -- Announces new rows where another process holds the notebook, and only there: an announcement takes a lock of
    -- the whole database at commit. A volatile function looks with a snapshot of its own, taken after the caller has
    -- locked the notebook, so it sees every holder who came before; the statement that calls it may not.
    create function announce_rows(about uuid, sender uuid, last_seq bigint) returns boolean
      language plpgsql volatile as $$
      begin
        if not exists (
          select 1 from notebook_holders h where h.notebook_id = about and h.process_id <> sender
        ) then
          return false;
        end if;
        perform pg_notify('rows', json_build_object('from', sender, 'notebookId', about, 'seq', last_seq)::text);
        return true;
      end
      $$;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop function announce_rows; drop table notebook_holders, server_processes");
}
