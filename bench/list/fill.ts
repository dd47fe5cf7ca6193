/**
 * A catalogue of any size put straight into the tables, by PostgreSQL itself: invented values with plausible spreads, one satellite in five, some
 * values missing. For benches of the read side only: nothing here was computed from the measurements.
 */
import type { Knex } from 'knex'

export interface CatalogueSize {
  galaxies: number
  measurementsEach: number
  namesEach: number
}

/** Fills an empty, migrated database; one that holds that many galaxies already is left as it is. */
export async function fillCatalogue(knex: Knex, { galaxies, measurementsEach, namesEach }: CatalogueSize): Promise<void> {
  const held = await knex.raw<{ rows: { n: number }[] }>('SELECT count(*)::int AS n FROM galaxies')
  if (held.rows[0]?.n === galaxies) return
  await knex.transaction(async (trx) => {
    await trx.raw('SELECT setseed(0.42)')
    await trx.raw(`
      INSERT INTO revisions (number, summary) VALUES (1, 'An invented catalogue');
      INSERT INTO releases (label, revision, title) VALUES ('bench', 1, 'Bench');
      INSERT INTO sources (label, title, authors, year, kind) SELECT 'Source ' || i, 'Invented ' || i, '["Nobody"]', 1990 + i % 35, 'demonstration' FROM generate_series(1, 200) i`)
    await trx.raw(`INSERT INTO galaxies (created_at) SELECT now() FROM generate_series(1, ${galaxies})`)
    await trx.raw(`
      INSERT INTO galaxy_versions (galaxy, designation, slug, status, ra, dec, class, rev_from)
      SELECT id, 'Gal ' || id, 'gal-' || id, 'confirmed', 360 * random() * 0.999999, degrees(asin(2 * random() - 1)),
             (ARRAY['spiral','dwarf-irregular','dwarf-spheroidal','dwarf-irregular','elliptical','dwarf-spheroidal','ultra-faint','blue-compact'])[1 + floor(8 * random())::int], 1
      FROM galaxies ORDER BY id`)
    await trx.raw(`
      INSERT INTO galaxy_names (galaxy, name, name_key, preferred, rev_from)
      SELECT id, CASE WHEN i = 0 THEN 'Gal ' || id ELSE 'Cat' || chr(64 + i) || ' ' || (id * 7 + i) END, CASE WHEN i = 0 THEN 'gal' || id ELSE 'cat' || chr(96 + i) || (id * 7 + i) END, i = 0, 1
      FROM galaxies CROSS JOIN generate_series(0, ${namesEach - 1}) i`)
    await trx.raw(`
      INSERT INTO measurements (galaxy, quantity, value, err_plus, err_minus, method, source, rev_from)
      SELECT id, 'distance_modulus', 24 + 6 * random(), 0.1, 0.1, 'trgb', 1 + (id + i) % 200, 1 FROM galaxies CROSS JOIN generate_series(1, ${measurementsEach}) i`)
    await trx.raw(rowsSql(measurementsEach))
  })
  await knex.raw('VACUUM ANALYZE')
}

/** Some(p, x): x, or missing with the chance p. */
const some = (missing: number, value: string): string => `CASE WHEN random() < ${missing} THEN NULL ELSE ${value} END`

function rowsSql(measurementsEach: number): string {
  const columns: Record<string, string> = {
    galaxy: 'g.galaxy', slug: 'g.slug', name: 'g.designation', status: 'g.status', class: 'g.class', morphology: some(0.5, "'dIrr'"), morph_t: some(0.5, '10 * random()'),
    ra: 'g.ra', dec: 'g.dec', glon: '360 * random()', glat: 'g.dec', sgl: '360 * random()', sgb: 'g.dec', dm: 'g.dm', dm_err: '0.05 + 0.1 * random()', dm_err_sys: '0.05',
    distance: 'g.d', distance_lo: '0.95 * g.d', distance_hi: '1.05 * g.d', distance_method: "(ARRAY['trgb','cepheids','tully-fisher'])[1 + floor(3 * random())::int]",
    n_distance: '3', n_distance_all: '5', sgx: 'g.d * cosd(g.dec) * cosd(g.ra)', sgy: 'g.d * cosd(g.dec) * sind(g.ra)', sgz: 'g.d * sind(g.dec)',
    v_hel: some(0.3, '70 * g.d + 100 * random()'), v_hel_err: '5', v_gsr: some(0.3, '70 * g.d + 100 * random()'), v_lg: some(0.3, '70 * g.d + 100 * random()'),
    v_cmb: some(0.3, '70 * g.d + 100 * random()'), b_mag: some(0.2, '10 + 10 * random()'), v_mag: some(0.2, '10 + 10 * random()'), k_mag: some(0.6, '8 + 8 * random()'),
    ebv: '0.3 * random()', abs_b: some(0.2, '-22 * random()'), abs_v: some(0.2, '-22 * random()'), abs_k: some(0.6, '-24 * random()'), r_half: some(0.3, '5 * random()'),
    axis_ratio: some(0.3, 'random()'), position_angle: some(0.3, '180 * random()'), r_half_pc: some(0.3, '3000 * random()'), r_circ_pc: some(0.3, '3000 * random()'),
    mu_half: some(0.3, '20 + 8 * random()'), hi_flux: some(0.5, '20 * random()'), w50: some(0.5, '300 * random()'), log_mhi: some(0.5, '5 + 4 * random()'),
    log_mstar: some(0.2, '4 + 7 * random()'), metallicity: some(0.7, '-2.5 * random()'),
    host: "CASE WHEN g.galaxy % 5 = 0 THEN 'gal-' || (1 + g.galaxy % 400) END", host_relation: "CASE WHEN g.galaxy % 5 = 0 THEN 'satellite' WHEN g.galaxy <= 400 THEN 'host' ELSE 'field' END",
    host_probability: 'random()', tidal_index: '6 * random() - 3', main_disturber: "'gal-' || (1 + g.galaxy % 400)", host_sep: '1000 * random()', host_sep_lo: '900 * random()',
    host_sep_hi: '1100 * random()', host_angle: '20 * random()', host_dv: some(0.3, '200 * random() - 100'), n_measurements: String(measurementsEach), n_sources: '5', revision: '1',
    updated_at: "now() - random() * interval '300 days'", unit_vector: 'cube(ARRAY[cosd(g.dec) * cosd(g.ra), cosd(g.dec) * sind(g.ra), sind(g.dec)])',
    sg_position: 'cube(ARRAY[g.d * cosd(g.dec) * cosd(g.ra), g.d * cosd(g.dec) * sind(g.ra), g.d * sind(g.dec)])', rev_from: '1',
  }
  return `INSERT INTO catalogue_rows (${Object.keys(columns).join(', ')})
    SELECT ${Object.values(columns).join(', ')}
    FROM (SELECT v.*, dm, 10 ^ ((dm - 25) / 5) AS d FROM galaxy_versions v, LATERAL (SELECT 24 + 6.2 * power(random(), 0.3333) + 0 * v.galaxy AS dm) AS x) AS g`
}
