/** Extensions, people, their sessions, and the audit log. */
import type { Knex } from 'knex'

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    CREATE EXTENSION IF NOT EXISTS citext;
    CREATE EXTENSION IF NOT EXISTS cube;
    CREATE EXTENSION IF NOT EXISTS pg_trgm;

    CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
    BEGIN
      RAISE EXCEPTION '% is append-only: % refused', TG_TABLE_NAME, TG_OP USING ERRCODE = 'restrict_violation';
    END $$;

    CREATE TABLE users (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      name text NOT NULL CHECK (name <> '' AND length(name) <= 200),
      email citext NOT NULL UNIQUE CHECK (length(email) <= 254),
      orcid text CHECK (orcid ~ '^\\d{4}-\\d{4}-\\d{4}-\\d{3}[0-9X]$'),
      roles text[] NOT NULL DEFAULT '{}'
        CHECK (roles <@ ARRAY['researcher', 'outreach', 'curator', 'approver', 'steward']),
      password_hash text,
      state text NOT NULL DEFAULT 'invited' CHECK (state IN ('invited', 'active', 'suspended')),
      created_at timestamptz NOT NULL DEFAULT now(),
      last_seen_at timestamptz,
      CHECK (state <> 'active' OR password_hash IS NOT NULL)
    );

    -- The table that connect-pg-simple expects.
    CREATE TABLE sessions (
      sid text PRIMARY KEY,
      sess json NOT NULL,
      expire timestamptz NOT NULL
    );
    CREATE INDEX sessions_expire ON sessions (expire);
    -- Sessions of one person, so that all of them can be ended at once.
    CREATE INDEX sessions_user ON sessions ((sess #>> '{passport,user}'));

    CREATE TABLE audit_log (
      id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      at timestamptz NOT NULL DEFAULT now(),
      actor integer REFERENCES users ON DELETE RESTRICT,
      action text NOT NULL,
      subject text NOT NULL,
      details jsonb NOT NULL DEFAULT '{}'
    );
    CREATE INDEX audit_log_at ON audit_log (at DESC);
    CREATE INDEX audit_log_subject ON audit_log (subject, id DESC);
    CREATE TRIGGER audit_log_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON audit_log
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
  `)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    DROP TABLE audit_log, sessions, users;
    DROP FUNCTION refuse_change();
  `)
}
