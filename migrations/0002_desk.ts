/** Sources, submissions and their versions, changes, reviews and remarks; revisions. */
import type { Knex } from 'knex'

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    CREATE TABLE sources (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      bibcode text UNIQUE CHECK (length(bibcode) = 19),
      doi text UNIQUE CHECK (doi = lower(doi) AND doi LIKE '10.%/%'),
      -- Short citation, made from authors and year: "Gieren et al. 2005".
      label text NOT NULL CHECK (label <> ''),
      title text NOT NULL CHECK (title <> ''),
      authors jsonb NOT NULL CHECK (jsonb_typeof(authors) = 'array'),
      year smallint NOT NULL CHECK (year BETWEEN 1600 AND 2200),
      venue text NOT NULL DEFAULT '',
      kind text NOT NULL CHECK (kind IN ('article', 'catalogue', 'thesis', 'private', 'demonstration')),
      url text,
      -- The words by which tables cite it, so that the next import finds it again.
      cited_as text[] NOT NULL DEFAULT '{}',
      created_by integer REFERENCES users ON DELETE RESTRICT,
      created_at timestamptz NOT NULL DEFAULT now()
    );
    CREATE INDEX sources_cited_as ON sources USING gin (cited_as);
    CREATE INDEX sources_words ON sources USING gin ((label || ' ' || title) gin_trgm_ops);

    CREATE TABLE submissions (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      author integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      title text NOT NULL CHECK (title <> '' AND length(title) <= 160),
      summary text NOT NULL DEFAULT '',
      state text NOT NULL DEFAULT 'draft'
        CHECK (state IN ('draft', 'submitted', 'returned', 'approved', 'rejected', 'withdrawn')),
      base_revision integer NOT NULL,
      -- Of the newest submitted version; 0 before the first.
      version integer NOT NULL DEFAULT 0,
      content_hash text,
      created_at timestamptz NOT NULL DEFAULT now(),
      updated_at timestamptz NOT NULL DEFAULT now(),
      submitted_at timestamptz,
      decided_by integer REFERENCES users ON DELETE RESTRICT,
      decided_at timestamptz,
      decision_note text,
      revision integer UNIQUE,
      lock_version integer NOT NULL DEFAULT 0,
      CHECK (state <> 'submitted' OR (submitted_at IS NOT NULL AND content_hash IS NOT NULL AND version > 0)),
      CHECK ((state = 'approved') = (revision IS NOT NULL)),
      CHECK (state NOT IN ('approved', 'rejected') OR (decided_by IS NOT NULL AND decided_at IS NOT NULL)),
      -- Nobody decides on his own work, by any path.
      CHECK (decided_by IS NULL OR decided_by <> author)
    );
    CREATE INDEX submissions_author ON submissions (author, state, updated_at DESC);
    CREATE INDEX submissions_waiting ON submissions (submitted_at) WHERE state = 'submitted';

    -- Everybody who wrote in a submission: none of them may review it.
    CREATE TABLE submission_editors (
      submission integer NOT NULL REFERENCES submissions ON DELETE CASCADE,
      editor integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      PRIMARY KEY (submission, editor)
    );

    CREATE TABLE changes (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      submission integer NOT NULL REFERENCES submissions ON DELETE CASCADE,
      position integer NOT NULL,
      action text NOT NULL CHECK (action IN ('galaxy.add', 'galaxy.amend', 'galaxy.withdraw', 'galaxy.merge', 'name.add', 'name.retire',
        'measurement.add', 'measurement.replace', 'measurement.exclude', 'measurement.restore',
        'anchor.set', 'policy.set', 'override.set', 'override.clear')),
      payload jsonb NOT NULL,
      -- The version it was made from, with the fields that it would change: {"versionId": ..., "fields": {...}}; null for an addition.
      base jsonb,
      -- The galaxy it touches, where that exists already: for overlaps with other submissions.
      galaxy integer,
      updated_at timestamptz NOT NULL DEFAULT now(),
      UNIQUE (submission, position) DEFERRABLE INITIALLY DEFERRED
    );
    CREATE INDEX changes_galaxy ON changes (galaxy);

    -- What was submitted, frozen: a review speaks of one content hash.
    CREATE TABLE submission_versions (
      submission integer NOT NULL REFERENCES submissions ON DELETE RESTRICT,
      version integer NOT NULL CHECK (version > 0),
      content_hash text NOT NULL,
      content jsonb NOT NULL,
      submitted_by integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      submitted_at timestamptz NOT NULL DEFAULT now(),
      PRIMARY KEY (submission, version)
    );
    CREATE TRIGGER submission_versions_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON submission_versions
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    CREATE TABLE reviews (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      submission integer NOT NULL,
      version integer NOT NULL,
      content_hash text NOT NULL,
      reviewer integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      verdict text NOT NULL CHECK (verdict IN ('approved', 'returned', 'rejected')),
      note text NOT NULL DEFAULT '',
      at timestamptz NOT NULL DEFAULT now(),
      FOREIGN KEY (submission, version) REFERENCES submission_versions ON DELETE RESTRICT
    );
    CREATE INDEX reviews_submission ON reviews (submission, id);
    CREATE TRIGGER reviews_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON reviews
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    CREATE TABLE remarks (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      submission integer NOT NULL REFERENCES submissions ON DELETE CASCADE,
      change integer REFERENCES changes ON DELETE SET NULL,
      author integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      body text NOT NULL CHECK (body <> ''),
      at timestamptz NOT NULL DEFAULT now(),
      resolved_at timestamptz
    );
    CREATE INDEX remarks_submission ON remarks (submission, id);
    CREATE INDEX remarks_change ON remarks (change) WHERE change IS NOT NULL;

    CREATE TABLE revisions (
      number integer PRIMARY KEY CHECK (number > 0),
      submission integer UNIQUE REFERENCES submissions ON DELETE RESTRICT,
      approved_by integer REFERENCES users ON DELETE RESTRICT,
      approved_at timestamptz NOT NULL DEFAULT now(),
      summary text NOT NULL
    );
    CREATE TRIGGER revisions_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON revisions
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    ALTER TABLE submissions ADD FOREIGN KEY (revision) REFERENCES revisions DEFERRABLE INITIALLY DEFERRED;

    CREATE TABLE imports (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      owner integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      file_name text NOT NULL,
      format text NOT NULL,
      bytes integer NOT NULL CHECK (bytes >= 0),
      sha256 text NOT NULL,
      store_key text NOT NULL,
      headers jsonb NOT NULL,
      mapping jsonb NOT NULL,
      submission integer REFERENCES submissions ON DELETE SET NULL,
      created_at timestamptz NOT NULL DEFAULT now()
    );
    CREATE INDEX imports_owner ON imports (owner, created_at DESC);

    CREATE TABLE import_rows (
      import integer NOT NULL REFERENCES imports ON DELETE CASCADE,
      number integer NOT NULL,
      raw jsonb NOT NULL,
      parsed jsonb,
      problems jsonb NOT NULL DEFAULT '[]',
      left_out text,
      -- The change it became.
      change integer REFERENCES changes ON DELETE SET NULL,
      PRIMARY KEY (import, number)
    );
    CREATE INDEX import_rows_bad ON import_rows (import, number) WHERE problems <> '[]';
    -- Removing a change looks for the row that it came from.
    CREATE INDEX import_rows_change ON import_rows (change) WHERE change IS NOT NULL;
  `)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    DROP TABLE import_rows, imports, remarks, reviews, submission_versions, changes, submission_editors CASCADE;
    DROP TABLE submissions, revisions, sources CASCADE;
  `)
}
