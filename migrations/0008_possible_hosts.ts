/** Membership over several hosts: how likely each is, the median separation, and the error of the velocity difference. */
import type { Knex } from 'knex'

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    ALTER TABLE catalogue_rows
      ADD COLUMN host_sep_median double precision,
      ADD COLUMN host_dv_err double precision,
      -- [{"host": slug, "p": probability}], most likely first; json and not jsonb, so that its text can be compared with what was written.
      ADD COLUMN possible_hosts json NOT NULL DEFAULT '[]' CHECK (json_typeof(possible_hosts) = 'array');

    -- With which version of the computation (core/computation.ts) the catalogue was computed, and the first revision that it made.
    CREATE TABLE computations (
      version integer PRIMARY KEY,
      revision integer NOT NULL REFERENCES revisions DEFERRABLE INITIALLY DEFERRED,
      at timestamptz NOT NULL DEFAULT now()
    );
  `)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TABLE computations; ALTER TABLE catalogue_rows DROP COLUMN host_sep_median, DROP COLUMN host_dv_err, DROP COLUMN possible_hosts')
}
