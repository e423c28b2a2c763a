import type { Knex } from "knex";

/** People, sessions, notebooks, the durable document log, results, referee links, mail and events. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table people (
      id uuid primary key default gen_random_uuid(),
      login text not null,
      name text not null,
      email text,
      email_verified boolean not null default false,
      created_at timestamptz not null default now(),
      check (length(login) between 1 and 100)
    );
    create unique index people_login on people (lower(login));
    create index people_email on people (lower(email)) where email_verified;

    create table identities (
      provider text not null,
      subject text not null,
      person_id uuid not null references people on delete cascade,
      created_at timestamptz not null default now(),
      primary key (provider, subject)
    );
    create index identities_person on identities (person_id);

    -- The layout connect-pg-simple expects.
    create table sessions (
      sid text primary key,
      sess json not null,
      expire timestamptz not null
    );
    create index sessions_expire on sessions (expire);

    create table notebooks (
      id uuid primary key default gen_random_uuid(),
      title text not null check (length(title) between 1 and 300),
      schema_version integer not null default 1,
      last_seq bigint not null default 0,
      premises_line text not null default '',
      pins_moved integer not null default 0,
      pins_loose integer not null default 0,
      created_by uuid references people on delete set null,
      created_at timestamptz not null default now(),
      changed_at timestamptz not null default now(),
      changed_by uuid references people on delete set null,
      archived_at timestamptz,
      deleted_at timestamptz
    );
    create index notebooks_changed on notebooks (changed_at desc, id);

    create table notebook_people (
      notebook_id uuid not null references notebooks on delete cascade,
      person_id uuid not null references people on delete cascade,
      role text not null check (role in ('owner', 'author', 'reviewer', 'reader')),
      since timestamptz not null default now(),
      primary key (notebook_id, person_id)
    );
    create index notebook_people_person on notebook_people (person_id);

    create table invitations (
      id uuid primary key default gen_random_uuid(),
      notebook_id uuid not null references notebooks on delete cascade,
      login text,
      email text,
      role text not null check (role in ('owner', 'author', 'reviewer', 'reader')),
      invited_by uuid references people on delete set null,
      invited_at timestamptz not null default now(),
      check ((login is null) <> (email is null))
    );
    create unique index invitations_login on invitations (notebook_id, lower(login)) where login is not null;
    create unique index invitations_email on invitations (notebook_id, lower(email)) where email is not null;
    create index invitations_by_login on invitations (lower(login));
    create index invitations_by_email on invitations (lower(email));

    -- Append only. seq is allocated under a row lock on the notebook, in the inserting transaction.
    create table document_updates (
      notebook_id uuid not null references notebooks on delete cascade,
      seq bigint not null,
      update bytea not null,
      person_id uuid references people on delete set null,
      committed_at timestamptz not null default now(),
      quarantined_at timestamptz,
      primary key (notebook_id, seq)
    );

    -- The compacted state up to and including seq.
    create table document_states (
      notebook_id uuid primary key references notebooks on delete cascade,
      seq bigint not null,
      state bytea not null,
      compacted_at timestamptz not null default now()
    );

    create table results (
      key text primary key,
      engine_version text not null,
      inputs jsonb not null,
      value jsonb not null,
      created_at timestamptz not null default now()
    );
    create table notebook_results (
      notebook_id uuid not null references notebooks on delete cascade,
      block_id text not null,
      key text not null references results,
      settled_at timestamptz not null default now(),
      changed_by uuid references people on delete set null,
      primary key (notebook_id, block_id)
    );
    create index notebook_results_key on notebook_results (key);

    create table referee_links (
      id uuid primary key default gen_random_uuid(),
      notebook_id uuid not null references notebooks on delete cascade,
      name text not null,
      token_hash bytea not null unique,
      hide_authors boolean not null default false,
      created_by uuid references people on delete set null,
      created_at timestamptz not null default now(),
      expires_at timestamptz,
      revoked_at timestamptz,
      last_opened_at timestamptz
    );
    create index referee_links_notebook on referee_links (notebook_id, created_at);

    create table mail_queue (
      id uuid primary key default gen_random_uuid(),
      recipient text not null,
      subject text not null,
      body text not null,
      attempts integer not null default 0,
      last_error text,
      created_at timestamptz not null default now(),
      next_attempt_at timestamptz not null default now(),
      sent_at timestamptz,
      given_up_at timestamptz
    );
    create index mail_queue_due on mail_queue (next_attempt_at) where sent_at is null and given_up_at is null;

    create table events (
      id bigint generated always as identity primary key,
      at timestamptz not null default now(),
      person_id uuid references people on delete set null,
      notebook_id uuid references notebooks on delete cascade,
      what text not null,
      details jsonb not null default '{}'
    );
    create index events_notebook on events (notebook_id, id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table events, mail_queue, referee_links, notebook_results, results, document_states, document_updates,
      invitations, notebook_people, notebooks, sessions, identities, people
  `);
}
