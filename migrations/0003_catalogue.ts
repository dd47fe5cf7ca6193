/**
 * The catalogue in time: every versioned table carries [rev_from, rev_to), rev_to null while it holds. The revision is checked at commit, so
 * that the effect of a submission can be computed by doing it all and rolling back, without making a revision.
 */
import type { Knex } from 'knex'

const interval = `
      rev_from integer NOT NULL REFERENCES revisions DEFERRABLE INITIALLY DEFERRED,
      rev_to integer REFERENCES revisions DEFERRABLE INITIALLY DEFERRED,
      CHECK (rev_to > rev_from)`

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    CREATE TABLE galaxies (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      created_at timestamptz NOT NULL DEFAULT now()
    );

    CREATE TABLE galaxy_versions (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      designation text NOT NULL CHECK (designation <> '' AND length(designation) <= 80),
      slug text NOT NULL CHECK (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      status text NOT NULL CHECK (status IN ('confirmed', 'candidate', 'withdrawn')),
      ra double precision NOT NULL CHECK (ra >= 0 AND ra < 360),
      dec double precision NOT NULL CHECK (dec BETWEEN -90 AND 90),
      class text NOT NULL CHECK (class IN ('spiral', 'lenticular', 'elliptical', 'dwarf-elliptical', 'dwarf-spheroidal', 'dwarf-irregular',
        'transition', 'blue-compact', 'irregular', 'ultra-faint', 'unknown')),
      note text,${interval}
    );
    CREATE UNIQUE INDEX galaxy_versions_current ON galaxy_versions (galaxy) WHERE rev_to IS NULL;
    CREATE UNIQUE INDEX galaxy_versions_slug ON galaxy_versions (slug) WHERE rev_to IS NULL;
    CREATE INDEX galaxy_versions_galaxy ON galaxy_versions (galaxy, rev_from);
    CREATE INDEX galaxy_versions_slug_ever ON galaxy_versions (slug);

    CREATE TABLE galaxy_names (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      name text NOT NULL CHECK (name <> '' AND length(name) <= 80),
      -- Normalised by core/names.ts.
      name_key text COLLATE "C" NOT NULL,
      preferred boolean NOT NULL DEFAULT false,
      source integer REFERENCES sources ON DELETE RESTRICT,${interval}
    );
    CREATE UNIQUE INDEX galaxy_names_once ON galaxy_names (galaxy, name) WHERE rev_to IS NULL;
    CREATE UNIQUE INDEX galaxy_names_preferred ON galaxy_names (galaxy) WHERE rev_to IS NULL AND preferred;
    CREATE INDEX galaxy_names_key ON galaxy_names (name_key text_pattern_ops);
    CREATE INDEX galaxy_names_trigrams ON galaxy_names USING gin (name_key gin_trgm_ops);
    CREATE INDEX galaxy_names_galaxy ON galaxy_names (galaxy, rev_from);

    -- A row is a version; "lineage" names the measurement through all its versions (the id of the first).
    CREATE SEQUENCE measurement_lineages AS integer;
    CREATE TABLE measurements (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      lineage integer NOT NULL DEFAULT nextval('measurement_lineages'),
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      quantity text NOT NULL CHECK (quantity IN ('distance_modulus', 'velocity', 'b_mag', 'v_mag', 'k_mag', 'ebv', 'r_half', 'axis_ratio',
        'position_angle', 'hi_flux', 'w50', 'metallicity', 'morphology', 'morph_t', 'log_mstar')),
      value double precision CHECK (value BETWEEN -1e12 AND 1e12),
      err_plus double precision CHECK (err_plus >= 0 AND err_plus < 1e12),
      err_minus double precision CHECK (err_minus >= 0 AND err_minus < 1e12),
      err_sys double precision CHECK (err_sys >= 0 AND err_sys < 1e12),
      text_value text,
      limit_flag text CHECK (limit_flag IN ('upper', 'lower')),
      method text,
      anchor text,
      anchor_value_assumed double precision,
      convention text CHECK (convention IN ('true', 'sfd')),
      published jsonb,
      source integer NOT NULL REFERENCES sources ON DELETE RESTRICT,
      locator text,
      note text,
      excluded_reason text,
      supersedes integer,
      entered_by integer REFERENCES users ON DELETE RESTRICT,${interval},
      CHECK ((value IS NULL) <> (text_value IS NULL)),
      CHECK ((quantity = 'morphology') = (text_value IS NOT NULL)),
      CHECK (quantity <> 'distance_modulus' OR method IS NOT NULL),
      CHECK (anchor_value_assumed IS NULL OR anchor IS NOT NULL)
    );
    ALTER SEQUENCE measurement_lineages OWNED BY measurements.lineage;
    CREATE UNIQUE INDEX measurements_current ON measurements (lineage) WHERE rev_to IS NULL;
    CREATE INDEX measurements_galaxy ON measurements (galaxy, quantity) WHERE rev_to IS NULL;
    CREATE INDEX measurements_galaxy_ever ON measurements (galaxy, rev_from);
    CREATE INDEX measurements_source ON measurements (source) WHERE rev_to IS NULL;
    CREATE INDEX measurements_anchor ON measurements (anchor) WHERE rev_to IS NULL AND anchor IS NOT NULL;

    CREATE TABLE anchors (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      key text NOT NULL CHECK (key ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      label text NOT NULL CHECK (label <> ''),
      kind text NOT NULL CHECK (kind IN ('modulus', 'absolute-magnitude')),
      methods text[] NOT NULL,
      value double precision NOT NULL CHECK (value BETWEEN -30 AND 40),
      err double precision NOT NULL CHECK (err BETWEEN 0 AND 2),
      source text NOT NULL,${interval}
    );
    CREATE UNIQUE INDEX anchors_current ON anchors (key) WHERE rev_to IS NULL;

    CREATE TABLE policies (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      document jsonb NOT NULL CHECK (jsonb_typeof(document) = 'object'),${interval}
    );
    -- One policy holds at a time.
    CREATE UNIQUE INDEX policies_current ON policies ((true)) WHERE rev_to IS NULL;

    CREATE TABLE overrides (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      about text NOT NULL,
      choice jsonb NOT NULL,
      reason text NOT NULL CHECK (length(reason) >= 3),${interval}
    );
    CREATE UNIQUE INDEX overrides_current ON overrides (galaxy, about) WHERE rev_to IS NULL;

    CREATE TABLE adopted_values (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      quantity text NOT NULL,
      value double precision,
      text_value text,
      err_plus double precision CHECK (err_plus >= 0),
      err_minus double precision CHECK (err_minus >= 0),
      err_sys double precision CHECK (err_sys >= 0),
      n_used integer NOT NULL CHECK (n_used >= 0),
      n_all integer NOT NULL CHECK (n_all >= n_used),
      chi2 double precision,
      dof integer,
      scatter double precision CHECK (scatter >= 0),
      method text,
      sentence text NOT NULL,
      reasons jsonb NOT NULL,
      override_reason text,${interval}
    );
    CREATE UNIQUE INDEX adopted_values_current ON adopted_values (galaxy, quantity) WHERE rev_to IS NULL;
    CREATE INDEX adopted_values_ever ON adopted_values (galaxy, rev_from);

    CREATE TABLE catalogue_rows (
      id integer GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      galaxy integer NOT NULL REFERENCES galaxies ON DELETE RESTRICT,
      -- One typed column per entry of core/columns.ts.
      slug text COLLATE "C" NOT NULL,
      name text COLLATE "C" NOT NULL,
      status text NOT NULL,
      class text NOT NULL,
      morphology text,
      morph_t double precision,
      ra double precision NOT NULL,
      dec double precision NOT NULL,
      glon double precision NOT NULL,
      glat double precision NOT NULL,
      sgl double precision NOT NULL,
      sgb double precision NOT NULL,
      dm double precision,
      dm_err double precision,
      dm_err_sys double precision,
      distance double precision CHECK (distance > 0),
      distance_lo double precision,
      distance_hi double precision,
      distance_method text,
      n_distance integer NOT NULL,
      n_distance_all integer NOT NULL,
      sgx double precision,
      sgy double precision,
      sgz double precision,
      v_hel double precision,
      v_hel_err double precision,
      v_gsr double precision,
      v_lg double precision,
      v_cmb double precision,
      b_mag double precision,
      v_mag double precision,
      k_mag double precision,
      ebv double precision,
      abs_b double precision,
      abs_v double precision,
      abs_k double precision,
      r_half double precision,
      axis_ratio double precision,
      position_angle double precision,
      r_half_pc double precision,
      r_circ_pc double precision,
      mu_half double precision,
      hi_flux double precision,
      w50 double precision,
      log_mhi double precision,
      log_mstar double precision,
      metallicity double precision,
      host text COLLATE "C",
      host_relation text NOT NULL CHECK (host_relation IN ('host', 'satellite', 'field')),
      host_probability double precision CHECK (host_probability BETWEEN 0 AND 1),
      tidal_index double precision,
      main_disturber text COLLATE "C",
      host_sep double precision,
      host_sep_lo double precision,
      host_sep_hi double precision,
      host_angle double precision,
      host_dv double precision,
      n_measurements integer NOT NULL,
      n_sources integer NOT NULL,
      revision integer NOT NULL,
      updated_at timestamptz NOT NULL,
      -- For the computation and for search in space.
      main_disturber_galaxy integer REFERENCES galaxies ON DELETE RESTRICT,
      index_disturber_galaxy integer REFERENCES galaxies ON DELETE RESTRICT,
      unit_vector cube NOT NULL,
      sg_position cube,${interval},
      CHECK ((host IS NOT NULL) = (host_relation = 'satellite'))
    );
    CREATE UNIQUE INDEX catalogue_rows_current ON catalogue_rows (galaxy) WHERE rev_to IS NULL;
    CREATE UNIQUE INDEX catalogue_rows_slug ON catalogue_rows (slug) WHERE rev_to IS NULL;
    CREATE INDEX catalogue_rows_ever ON catalogue_rows (galaxy, rev_from);
    CREATE INDEX catalogue_rows_slug_ever ON catalogue_rows (slug, rev_from);
    -- What changed in a revision: the neighbourhood in memory follows by these.
    CREATE INDEX catalogue_rows_from ON catalogue_rows (rev_from);
    CREATE INDEX catalogue_rows_to ON catalogue_rows (rev_to) WHERE rev_to IS NOT NULL;
    CREATE INDEX catalogue_rows_host ON catalogue_rows (host, galaxy) WHERE rev_to IS NULL;
    CREATE INDEX catalogue_rows_disturber ON catalogue_rows (main_disturber_galaxy) WHERE rev_to IS NULL;
    CREATE INDEX catalogue_rows_index_disturber ON catalogue_rows (index_disturber_galaxy) WHERE rev_to IS NULL;
    CREATE INDEX catalogue_rows_sky ON catalogue_rows USING gist (unit_vector) WHERE rev_to IS NULL;
    CREATE INDEX catalogue_rows_space ON catalogue_rows USING gist (sg_position) WHERE rev_to IS NULL;
  `)
  // The columns that the table is sorted by most, each with the tie-breaker of keyset paging.
  for (const column of ['name', 'distance', 'abs_v', 'abs_b', 'v_lg', 'tidal_index', 'host_sep', 'class']) {
    await knex.raw('CREATE INDEX ?? ON catalogue_rows (??, galaxy) WHERE rev_to IS NULL', [`catalogue_rows_by_${column}`, column])
  }
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    DROP TABLE catalogue_rows, adopted_values, overrides, policies, anchors, measurements, galaxy_names, galaxy_versions, galaxies;
  `)
}
