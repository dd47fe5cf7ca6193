/** Three more bands and isophotal diameters can be measured; derived values have errors. */
import type { Knex } from 'knex'

const QUANTITIES = [
  'distance_modulus', 'velocity', 'b_mag', 'v_mag', 'k_mag', 'ebv', 'r_half', 'axis_ratio', 'position_angle', 'hi_flux', 'w50', 'metallicity', 'morphology', 'morph_t', 'log_mstar',
]
const NEW_QUANTITIES = ['i_mag', 'g_mag', 'r_mag', 'diameter']

const COLUMNS = [
  'i_mag', 'g_mag', 'r_mag', 'abs_i', 'abs_g', 'abs_r', 'abs_b_err', 'abs_v_err', 'abs_k_err', 'abs_i_err', 'abs_g_err', 'abs_r_err', 'diameter', 'diameter_kpc', 'diameter_kpc_err',
  'r_half_pc_err', 'r_circ_pc_err', 'mu_half_err', 'log_mhi_err', 'log_mstar_err',
]

const quantityCheck = (quantities: readonly string[]): string => `
  ALTER TABLE measurements DROP CONSTRAINT measurements_quantity_check,
    ADD CONSTRAINT measurements_quantity_check CHECK (quantity IN (${quantities.map((q) => `'${q}'`).join(', ')}))`

export async function up(knex: Knex): Promise<void> {
  await knex.raw(quantityCheck([...QUANTITIES, ...NEW_QUANTITIES]))
  await knex.raw(`ALTER TABLE catalogue_rows ${COLUMNS.map((c) => `ADD COLUMN ${c} double precision${c.endsWith('_err') ? ` CHECK (${c} >= 0)` : ''}`).join(', ')}`)
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`ALTER TABLE catalogue_rows ${COLUMNS.map((c) => `DROP COLUMN ${c}`).join(', ')}`)
  await knex.raw(quantityCheck(QUANTITIES))
}
