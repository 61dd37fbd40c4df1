import type { Knex } from 'knex';

/** Members, their tokens, and the role under which the server works. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    do $$ begin
      create role thalweg_application login;
    exception when duplicate_object or unique_violation then null;
    end $$;

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception 'rows of % never change', tg_table_name using errcode = 'restrict_violation';
    end $$;

    create table members (
      id uuid primary key default gen_random_uuid(),
      name text not null unique check (name ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(name) between 2 and 39),
      full_name text not null check (length(full_name) between 1 and 200),
      role text not null default 'member' check (role in ('member', 'reviewer', 'administrator')),
      created_at timestamptz not null default now()
    );

    create table tokens (
      id uuid primary key default gen_random_uuid(),
      member_id uuid not null references members,
      label text not null check (length(label) between 1 and 100),
      digest bytea not null unique check (octet_length(digest) = 32),
      scopes text[] not null check (scopes <@ array['read', 'publish', 'withdraw'] and cardinality(scopes) > 0),
      created_at timestamptz not null default now(),
      expires_at timestamptz not null check (expires_at > created_at),
      last_used_at timestamptz,
      revoked_at timestamptz
    );
    create index on tokens (member_id);

    grant usage on schema public to thalweg_application;
    grant select on members to thalweg_application;
    grant select on tokens to thalweg_application;
    grant update (last_used_at, revoked_at) on tokens to thalweg_application;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table tokens;
    drop table members;
    drop function refuse_change();
  `);
}
