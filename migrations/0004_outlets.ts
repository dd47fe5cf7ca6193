/** Releases and kept figures. */
import type { Knex } from 'knex'

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    CREATE TABLE releases (
      label text PRIMARY KEY CHECK (label ~ '^[0-9A-Za-z][0-9A-Za-z.-]{0,39}$'),
      revision integer NOT NULL REFERENCES revisions ON DELETE RESTRICT,
      title text NOT NULL CHECK (title <> ''),
      notes text NOT NULL DEFAULT '',
      published_by integer REFERENCES users ON DELETE RESTRICT,
      published_at timestamptz NOT NULL DEFAULT now()
    );
    CREATE INDEX releases_newest ON releases (published_at DESC);
    CREATE TRIGGER releases_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON releases
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    CREATE TABLE figures (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      owner integer NOT NULL REFERENCES users ON DELETE RESTRICT,
      title text NOT NULL CHECK (title <> '' AND length(title) <= 160),
      shared boolean NOT NULL DEFAULT true,
      recipe jsonb NOT NULL CHECK (jsonb_typeof(recipe) = 'object'),
      created_at timestamptz NOT NULL DEFAULT now(),
      updated_at timestamptz NOT NULL DEFAULT now()
    );
    CREATE INDEX figures_owner ON figures (owner, updated_at DESC);

    -- What kind of catalogue this database holds, so that every page can say so.
    CREATE TABLE catalogue_kind (
      single boolean PRIMARY KEY DEFAULT true CHECK (single),
      kind text NOT NULL CHECK (kind IN ('demonstration', 'published', 'empty'))
    );
    INSERT INTO catalogue_kind (kind) VALUES ('empty');
  `)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TABLE catalogue_kind, figures, releases')
}
