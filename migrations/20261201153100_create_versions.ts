import type { Knex } from 'knex';

/**
 * Examples and their versions. What is published never changes: rows of `blobs` and `version_files` refuse every change, rows
 * of `versions` all but being listed and being withdrawn, whoever asks; the server's own role has not even the right to try.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(TABLES);
  await knex.raw(GUARDS);
}

const TABLES = `
    create table blobs (
      digest bytea primary key check (octet_length(digest) = 32),
      bytes bytea not null check (octet_length(bytes) <= 16777216),
      constraint blobs_digest_is_of_bytes check (digest = sha256(bytes))
    );
    alter table blobs alter column bytes set storage external;

    create table examples (
      id uuid primary key default gen_random_uuid(),
      owner_id uuid not null references members,
      slug text not null check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(slug) between 2 and 64),
      created_at timestamptz not null default now(),
      unique (owner_id, slug)
    );

    create table versions (
      id uuid primary key default gen_random_uuid(),
      example_id uuid not null references examples,
      version text not null,
      major integer not null check (major >= 0),
      minor integer not null check (minor >= 0),
      patch integer not null check (patch >= 0),
      prerelease text not null default '',
      archive bytea not null references blobs (digest),
      size integer not null check (size > 0),
      document jsonb not null,
      words tsvector not null,
      listed boolean not null,
      published_by uuid not null references members,
      published_at timestamptz(3) not null default clock_timestamp(),
      withdrawn_at timestamptz,
      withdrawn_because text,
      unique (example_id, version),
      unique (example_id, major, minor, patch, prerelease),
      check ((withdrawn_at is null) = (withdrawn_because is null))
    );
    create index on versions (published_at desc, id desc) where listed and withdrawn_at is null;
    create index on versions using gin (words);

    create table version_files (
      version_id uuid not null references versions,
      path text not null,
      digest bytea not null references blobs,
      size integer not null check (size >= 0),
      primary key (version_id, path)
    );
`;

const GUARDS = `
    create function guard_version() returns trigger language plpgsql as $$
    begin
      if row(new.id, new.example_id, new.version, new.major, new.minor, new.patch, new.prerelease, new.archive, new.size,
             new.document, new.words, new.published_by, new.published_at)
         is distinct from
         row(old.id, old.example_id, old.version, old.major, old.minor, old.patch, old.prerelease, old.archive, old.size,
             old.document, old.words, old.published_by, old.published_at)
         or (old.listed and not new.listed)
         or (old.withdrawn_at is not null and row(new.withdrawn_at, new.withdrawn_because)
             is distinct from row(old.withdrawn_at, old.withdrawn_because)) then
        raise exception 'a published version never changes' using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;

    create trigger guard before update on versions for each row execute function guard_version();
    create trigger keep before delete on versions for each row execute function refuse_change();
    create trigger keep before update or delete on blobs for each row execute function refuse_change();
    create trigger keep before update or delete on version_files for each row execute function refuse_change();
    create trigger keep_all before truncate on versions for each statement execute function refuse_change();
    create trigger keep_all before truncate on blobs for each statement execute function refuse_change();
    create trigger keep_all before truncate on version_files for each statement execute function refuse_change();

    grant select, insert on blobs, examples, versions, version_files to thalweg_application;
    grant update (listed, withdrawn_at, withdrawn_because) on versions to thalweg_application;
`;

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table version_files;
    drop table versions;
    drop table examples;
    drop table blobs;
    drop function guard_version();
  `);
}
