import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { adopt } from '../../../core/adoption/adopt.ts'
import type { Adopted } from '../../../core/adoption/adopted.ts'
import type { Galaxy, Measurement } from '../../../core/catalogue/types.ts'
import { COLUMNS } from '../../../core/columns.ts'
import { deriveOwn } from '../../../core/derive/own.ts'
import { relationOf } from '../../../core/derive/relation.ts'
import { neighbourhoodOf } from '../../../core/derive/neighbourhood.ts'
import { QUANTITY_KEYS, quantity, type QuantityKey } from '../../../core/quantities.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'

const galaxy: Galaxy = { id: 1, versionId: 1, slug: 'ostrel', designation: 'Ostrel', status: 'confirmed', class: 'dwarf-spheroidal', ra: 15.039, dec: -33.709, note: null }
/** No anchors: what is measured is what is adopted. */
const scale = { anchors: [], policy: DEFAULT_POLICY }

let nextId = 1
function measured(key: QuantityKey, value: number, more: Partial<Measurement> = {}): Measurement {
  const id = nextId++
  return {
    id, versionId: id, galaxyId: 1, quantity: key, value, errPlus: 0.05, errMinus: 0.05, errSys: null, textValue: null, limitFlag: null, method: key === 'distance_modulus' ? 'trgb' : null, anchor: null,
    anchorValueAssumed: null, convention: null, published: null, sourceId: id % 3, sourceLabel: `Marl ${id}`, sourceYear: 2000, locator: null, note: null, excludedReason: null, supersedes: null, ...more,
  }
}

function derive(measurements: readonly Measurement[]) {
  const adopted = new Map<QuantityKey, Adopted>()
  for (const key of new Set(measurements.map((m) => m.quantity))) {
    const value = adopt(key, measurements.filter((m) => m.quantity === key), scale)
    if (value) adopted.set(key, value)
  }
  return deriveOwn(galaxy, adopted, measurements)
}

describe('deriveOwn', () => {
  it('gives sizes and surface brightness as worked out independently', () => {
    // formulas: 11.30′, e = 0.32, 86 kpc: 282.7 pc along the major axis, 233.1 pc circularised; with V = 8.6, 24.3329 mag/arcsec².
    const row = derive([measured('distance_modulus', 5 * Math.log10(0.086) + 25), measured('r_half', 11.3), measured('axis_ratio', 0.68), measured('v_mag', 8.6)])
    expect(row.r_half_pc).toBeCloseTo(282.685, 2)
    expect(row.r_circ_pc).toBeCloseTo(233.108, 2)
    expect(row.mu_half).toBeCloseTo(24.3328704, 6)
  })

  it('corrects for extinction by the convention that the adopted E(B−V) states', () => {
    // M31: V = 3.44, μ = 24.407, E = 0.062: −21.1592 as a true reddening, −21.137004 as a value of the SFD map.
    const light = [measured('distance_modulus', 24.407), measured('v_mag', 3.44)]
    expect(derive([...light, measured('ebv', 0.062, { convention: 'true' })]).abs_v).toBeCloseTo(-21.1592, 6)
    expect(derive([...light, measured('ebv', 0.062, { convention: 'sfd' })]).abs_v).toBeCloseTo(-21.137004, 6)
    expect(derive(light).abs_v).toBeCloseTo(3.44 - 24.407, 9)
  })

  it('gives the mass of gas and of stars', () => {
    // H I: D = 3.60, S = 1000: 3.053376e9.
    expect(derive([measured('distance_modulus', 5 * Math.log10(3.6) + 25), measured('hi_flux', 1000)]).log_mhi).toBeCloseTo(Math.log10(3.053376e9), 6)
    // A measured mass comes first, then K, then B with the type's colour, then V.
    const far = measured('distance_modulus', 28)
    const k = measured('k_mag', 8)
    const b = measured('b_mag', 11)
    const v = measured('v_mag', 10.5)
    expect(derive([far, k, b, v, measured('log_mstar', 9.2)]).log_mstar).toBe(9.2)
    expect(derive([far, k, b, v]).log_mstar).toBeCloseTo(0.4 * (3.27 + 20), 9)
    expect(derive([far, b, v, measured('morph_t', 6)]).log_mstar).toBeCloseTo(0.4 * (3.27 - (11 - 28 - (4.6 - 0.25 * 6))), 9)
    expect(derive([far, v]).log_mstar).toBeCloseTo(0.4 * (3.27 - (10.5 - 28 - 2.3)), 9)
    expect(derive([far]).log_mstar).toBeNull()
  })

  it('gives an isophotal diameter by the tangent', () => {
    // 26.9′ at 3.60 Mpc: 28.16975786 kpc (computed).
    expect(derive([measured('distance_modulus', 5 * Math.log10(3.6) + 25), measured('diameter', 26.9)]).diameter_kpc).toBeCloseTo(28.16975786, 6)
  })

  it('corrects the further bands by the coefficients of the map (Schlafly & Finkbeiner 2011, table 6, R_V = 3.1: I 1.505, g 3.303, r 2.285)', () => {
    const row = derive([measured('distance_modulus', 25), measured('i_mag', 10), measured('g_mag', 10), measured('r_mag', 10), measured('ebv', 0.1, { convention: 'sfd' })])
    expect([row.abs_i, row.abs_g, row.abs_r]).toEqual([-15.1505, -15.3303, -15.2285].map((m): unknown => expect.closeTo(m, 9)))
  })

  it('carries the errors through: against moving each input by its error (Bevington & Robinson 2003, chapter 3: the parts in quadrature)', () => {
    const inputs: Partial<Record<QuantityKey, [value: number, error: number]>> = {
      distance_modulus: [27.5, 0.004], v_mag: [14, 0.003], b_mag: [14.7, 0.003], k_mag: [11.5, 0.004], i_mag: [13, 0.002], g_mag: [14.3, 0.002], r_mag: [13.8, 0.003], ebv: [0.12, 0.002], r_half: [0.8, 0.004],
      axis_ratio: [0.6, 0.003], hi_flux: [12, 0.05], diameter: [2.4, 0.01],
    }
    const keys = Object.keys(inputs) as QuantityKey[]
    const at = (shifted: QuantityKey | null): ReturnType<typeof derive> =>
      derive(
        keys.map((key) => {
          const [value, error] = inputs[key] ?? [0, 0]
          return measured(key, value + (key === shifted ? error : 0), { errPlus: error, errMinus: error, ...(key === 'ebv' ? { convention: 'sfd' as const } : {}) })
        }),
      )
    const here = at(null)
    // The adopted modulus has a systematic part beside the statistical one: its whole error moves by that much more.
    const stretch = Math.hypot(Number(here.dm_err), Number(here.dm_err_sys)) / 0.004
    for (const column of ['abs_v', 'abs_b', 'abs_k', 'abs_i', 'abs_g', 'abs_r', 'r_half_pc', 'r_circ_pc', 'diameter_kpc', 'mu_half', 'log_mhi', 'log_mstar']) {
      const parts = keys.map((key) => (Number(at(key)[column]) - Number(here[column])) * (key === 'distance_modulus' ? stretch : 1))
      const expected = Math.hypot(...parts)
      expect(Number(here[`${column}_err`]) / expected, column).toBeCloseTo(1, 2)
    }
  })

  it('knows no error of what has none, and takes a correction without one for exact', () => {
    const bare = { errPlus: null, errMinus: null }
    const light = [measured('distance_modulus', 27), measured('v_mag', 14, bare), measured('b_mag', 14), measured('ebv', 0.1, { ...bare, convention: 'true' as const }), measured('r_half', 1), measured('axis_ratio', 0.7, bare)]
    const row = derive(light)
    expect(row.abs_v_err).toBeNull()
    expect(row.abs_b_err).toBeCloseTo(Math.hypot(0.05, Number(row.dm_err), Number(row.dm_err_sys)), 9)
    expect(row.r_circ_pc_err).toBeCloseTo((Number(row.r_half_pc_err) / Number(row.r_half_pc)) * Number(row.r_circ_pc), 9)
    expect(row.mu_half_err).toBeNull()
  })

  it('carries both parts of the error into the bounds of the distance', () => {
    const row = derive([measured('distance_modulus', 27)])
    const both = Math.hypot(Number(row.dm_err), Number(row.dm_err_sys))
    expect(row.distance).toBeCloseTo(10 ** 0.4, 9)
    expect(row.distance_hi).toBeCloseTo(10 ** ((27 + both - 25) / 5), 9)
    expect(row.distance_lo).toBeCloseTo(10 ** ((27 - both - 25) / 5), 9)
    expect(Math.hypot(Number(row.sgx), Number(row.sgy), Number(row.sgz))).toBeCloseTo(10 ** 0.4, 9)
  })

  it('counts measurements and their sources, used or not', () => {
    const list = [measured('velocity', 230, { sourceId: 1 }), measured('velocity', 231, { sourceId: 2 }), measured('distance_modulus', 27, { sourceId: 2, excludedReason: 'blended' })]
    expect(derive(list)).toMatchObject({ n_measurements: 3, n_sources: 2, n_distance: 0, n_distance_all: 1, dm: null })
  })

  it('makes what depends on a missing value null, never a number, whatever is missing', () => {
    const values: Partial<Record<QuantityKey, number>> = { distance_modulus: 27, velocity: 230, b_mag: 12, v_mag: 11.5, k_mag: 9, ebv: 0.05, r_half: 2, axis_ratio: 0.7, position_angle: 40, hi_flux: 30, w50: 60, metallicity: -1.5, morph_t: 10 }
    const needs: Record<string, QuantityKey[]> = {
      distance: ['distance_modulus'], distance_lo: ['distance_modulus'], sgx: ['distance_modulus'], v_gsr: ['velocity'], v_lg: ['velocity'], v_cmb: ['velocity'], abs_b: ['b_mag', 'distance_modulus'],
      abs_v: ['v_mag', 'distance_modulus'], abs_k: ['k_mag', 'distance_modulus'], r_half_pc: ['r_half', 'distance_modulus'], r_circ_pc: ['r_half', 'distance_modulus', 'axis_ratio'],
      mu_half: ['r_half', 'axis_ratio', 'v_mag'], log_mhi: ['hi_flux', 'distance_modulus'], metallicity: ['metallicity'], w50: ['w50'], position_angle: ['position_angle'],
    }
    fc.assert(
      fc.property(fc.subarray(Object.keys(values) as QuantityKey[]), (present) => {
        const row = derive(present.map((key) => measured(key, values[key] ?? 0, key === 'ebv' ? { convention: 'sfd' } : {})))
        for (const [column, wanted] of Object.entries(needs)) {
          if (wanted.every((key) => present.includes(key))) expect(row[column], column).toEqual(expect.any(Number))
          else expect(row[column], column).toBeNull()
        }
        for (const value of Object.values(row)) expect(typeof value === 'number' ? Number.isFinite(value) : true).toBe(true)
      }),
    )
  })

  it('stays finite at the bounds of every quantity', () => {
    fc.assert(
      fc.property(fc.tuple(...QUANTITY_KEYS.map(() => fc.constantFrom(0, 1, 0.5))), (where) => {
        const list = QUANTITY_KEYS.flatMap((key, i) => {
          const { kind, bounds } = quantity(key)
          return kind === 'text' ? [] : [measured(key, bounds[0] + (where[i] ?? 0) * (bounds[1] - bounds[0]), key === 'ebv' ? { convention: 'true' } : {})]
        })
        for (const [column, value] of Object.entries(derive(list))) expect(typeof value !== 'number' || Number.isFinite(value), column).toBe(true)
      }),
    )
  })

  it('and the relation to others make every column of the registry but the two stamps', () => {
    const made = [...Object.keys(derive([])), ...Object.keys(relationOf(neighbourhoodOf([]), 1, DEFAULT_POLICY).columns), 'host_relation']
    expect(made.sort()).toEqual(COLUMNS.map((c) => c.key).filter((key) => key !== 'revision' && key !== 'updated_at').sort())
  })
})
