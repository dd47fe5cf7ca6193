/**
 * Indexes for sorting and filtering the current catalogue by more columns. Each also carries the status: nearly every question leaves withdrawn
 * galaxies out, and so counts from the index alone. Only current rows are in them, so that closing a version costs nothing here.
 */
import type { Knex } from 'knex'

/** Those that the third migration made, without the status. */
const OLD = ['name', 'distance', 'abs_v', 'abs_b', 'v_lg', 'tidal_index', 'host_sep', 'class']
const NEW = [
  ...OLD, 'ra', 'dec', 'glat', 'dm', 'v_hel', 'v_gsr', 'abs_k', 'morph_t', 'r_half_pc', 'mu_half', 'log_mhi', 'log_mstar', 'metallicity', 'host_probability', 'n_measurements',
  'updated_at', 'status',
]

export async function up(knex: Knex): Promise<void> {
  for (const column of OLD) await knex.raw('DROP INDEX ??', [`catalogue_rows_by_${column}`])
  for (const column of NEW) {
    const carried = column === 'status' ? '' : 'INCLUDE (status)'
    await knex.raw(`CREATE INDEX ?? ON catalogue_rows (??, galaxy) ${carried} WHERE rev_to IS NULL`, [`catalogue_rows_by_${column}`, column])
  }
}

export async function down(knex: Knex): Promise<void> {
  for (const column of NEW) await knex.raw('DROP INDEX ??', [`catalogue_rows_by_${column}`])
  for (const column of OLD) await knex.raw('CREATE INDEX ?? ON catalogue_rows (??, galaxy) WHERE rev_to IS NULL', [`catalogue_rows_by_${column}`, column])
}
