import type { Knex } from 'knex';

/** Answers to requests with an Idempotency-Key, and the append-only record of what was done. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table answers (
      member_id uuid not null references members,
      key text not null check (length(key) between 1 and 255),
      request bytea not null check (octet_length(request) = 32),
      status integer not null,
      body jsonb not null,
      created_at timestamptz not null default now(),
      primary key (member_id, key)
    );

    create table records (
      id bigint generated always as identity primary key,
      at timestamptz not null default clock_timestamp(),
      member_id uuid references members,
      action text not null,
      subject text not null,
      details jsonb not null default '{}'
    );
    create trigger keep before update or delete on records for each row execute function refuse_change();
    create trigger keep_all before truncate on records for each statement execute function refuse_change();

    grant select, insert on answers, records to thalweg_application;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table records;
    drop table answers;
  `);
}
