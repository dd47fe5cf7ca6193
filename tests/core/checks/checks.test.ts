import { describe, expect, it } from 'vitest'
import type { GalaxySurroundings, MeasurementSurroundings } from '../../../core/checks/check.ts'
import { checkMeasurement, checkNewGalaxy } from '../../../core/checks/run.ts'
import type { Measurement } from '../../../core/catalogue/types.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import { DEFAULT_ANCHORS } from '../../../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'

const held = (id: number, value: number, more: Partial<Measurement> = {}): Measurement => ({
  id, versionId: id, galaxyId: 1, quantity: 'distance_modulus', value, errPlus: 0.05, errMinus: 0.05, errSys: null, textValue: null, limitFlag: null, method: 'trgb', anchor: 'trgb-absolute-i',
  anchorValueAssumed: -4.049, convention: null, published: null, sourceId: 10 + id, sourceLabel: `Marl ${2000 + id}`, sourceYear: 2000 + id, locator: null, note: null, excludedReason: null, supersedes: null, ...more,
})

const typed = (value: number | null, more: Partial<MeasurementInput> = {}): MeasurementInput => ({
  quantity: 'distance_modulus', value, errPlus: 0.06, errMinus: 0.06, errSys: null, unit: 'mag', textValue: null, limitFlag: null, method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: -4.049,
  convention: null, sourceId: 99, locator: null, note: null, supersedes: null, ...more,
})

const around = (list: readonly Measurement[] = [held(1, 27.8), held(2, 27.82)]): MeasurementSurroundings => ({
  galaxy: 'Ostrel IX', held: list, scale: { anchors: DEFAULT_ANCHORS, policy: DEFAULT_POLICY }, sourceLabel: 'Quill 2025', position: { ra: 150, dec: 20 },
  sourceLacks: [], elsewhere: [], outlook: null,
})

/** "level: sentence" of one check, or undefined when it has nothing to say. */
function said(check: string, measurement: MeasurementInput, surroundings = around(), replaces: number | null = null): string | undefined {
  const found = checkMeasurement({ measurement, replaces }, surroundings).find((c) => c.check === check)
  return found && `${found.level}: ${found.sentence}`
}

describe('a measurement that fits', () => {
  it('meets no objection', () => {
    expect(checkMeasurement({ measurement: typed(27.81), replaces: null }, around()).map((c) => c.level)).toEqual(['ok', 'ok', 'ok', 'ok'])
  })

  it('of a galaxy of which nothing is held is compared with nothing', () => {
    expect(said('agreement', typed(27.81), around([]))).toBeUndefined()
    expect(said('unit-slip', typed(3631, { unit: 'kpc' }), around([]))).toBeUndefined()
  })
})

describe('unit-slip', () => {
  it('suggests the unit in which the number would fit', () => {
    // 3.63 Mpc typed as kpc, kpc as Mpc, and a modulus as Mpc.
    expect(said('unit-slip', typed(3.63, { unit: 'kpc' }))).toContain('as 3.63 Mpc it would fit')
    expect(said('unit-slip', typed(3630, { unit: 'Mpc' }))).toContain('as 3630 kpc it would fit')
    expect(said('unit-slip', typed(27.8, { unit: 'Mpc' }))).toMatch(/^warn: .*as 27\.8 mag it would fit/)
  })

  it('finds minutes typed for seconds of arc', () => {
    const list = [held(1, 0.5, { quantity: 'r_half', method: null }), held(2, 0.52, { quantity: 'r_half', method: null })]
    expect(said('unit-slip', typed(31, { quantity: 'r_half', unit: 'arcmin', method: null, anchor: null, anchorValueAssumed: null }), around(list))).toContain('as 31 arcsec')
  })

  it('is silent about a value that merely differs', () => {
    expect(said('unit-slip', typed(28.3))).toBeUndefined()
  })
})

describe('entered-before', () => {
  it('stops the very same value from the same source by the same method', () => {
    expect(said('entered-before', typed(27.8, { sourceId: 11 }))).toMatch(/^stop: Ostrel IX has this very value from Quill 2025 already/)
  })

  it('also when it was typed in another unit', () => {
    const inMpc = 10 ** ((27.8 - 25) / 5)
    expect(said('entered-before', typed(inMpc, { sourceId: 11, unit: 'Mpc' }))).toMatch(/^stop/)
  })

  it('asks about another value from the same source, and lets one that mends it pass', () => {
    expect(said('entered-before', typed(27.85, { sourceId: 11 }))).toMatch(/^warn/)
    expect(said('entered-before', typed(27.85, { sourceId: 11 }), around(), 1)).toMatch(/^ok/)
    expect(said('entered-before', typed(27.8, { sourceId: 11, method: 'cepheids' }))).toMatch(/^ok/)
  })
})

describe('error-bar', () => {
  it('asks about one that is missing, or that nobody reaches', () => {
    expect(said('error-bar', typed(27.8, { errPlus: null, errMinus: null }))).toContain('No error is given')
    expect(said('error-bar', typed(27.8, { errPlus: 0.0001, errMinus: 0.0001 }))).toContain('smaller than a distance modulus usually has')
    expect(said('error-bar', typed(27.8, { errPlus: 5, errMinus: 5 }))).toContain('larger')
    expect(said('error-bar', typed(27.8))).toMatch(/^ok/)
  })

  it('judges the error in the canonical unit', () => {
    // ± 0.1 Mpc at 3.6 Mpc is 0.06 mag.
    expect(said('error-bar', typed(3.6, { unit: 'Mpc', errPlus: 0.1, errMinus: 0.1 }))).toMatch(/^ok/)
  })
})

describe('anchor-stated', () => {
  it('asks for the anchor of a method that hangs on one', () => {
    expect(said('anchor-stated', typed(27.8, { anchor: null, anchorValueAssumed: null }))).toMatch(/^warn: A TRGB distance hangs on an anchor/)
    expect(said('anchor-stated', typed(27.8, { anchor: 'unheard-of' }))).toContain('no anchor called "unheard-of"')
    expect(said('anchor-stated', typed(27.8))).toMatch(/^ok/)
  })

  it('asks nothing of geometry, nor of other quantities', () => {
    expect(said('anchor-stated', typed(27.8, { method: 'masers', anchor: null, anchorValueAssumed: null }))).toBeUndefined()
    expect(said('anchor-stated', typed(12.1, { quantity: 'v_mag', method: null, anchor: null, anchorValueAssumed: null }))).toBeUndefined()
  })
})

describe('agreement', () => {
  it('asks about a value more than three standard deviations from the rest', () => {
    expect(said('agreement', typed(28.5))).toMatch(/^warn: \d+\.\d σ from the 27\.81\d mag of the other 2 values/)
    expect(said('agreement', typed(27.9))).toMatch(/^ok/)
  })

  it('compares on the catalogue’s scale', () => {
    // On its authors' anchor 0.3 mag too near, on ours in place.
    expect(said('agreement', typed(27.51, { anchorValueAssumed: -3.749, errPlus: 0.02, errMinus: 0.02 }))).toMatch(/^ok: 0\.0 σ/)
  })

  it('leaves out the value that is mended', () => {
    expect(said('agreement', typed(27.82), around([held(1, 35), held(2, 27.8)]), 1)).toMatch(/^ok/)
  })
})

describe('a new galaxy', () => {
  const galaxy = { designation: 'Ostrel XI', names: [], ra: 175.5301, dec: 23.2617 }
  const empty: GalaxySurroundings = { near: [], borne: [], measurements: 1 }

  it('meets no objection where nothing else is', () => {
    expect(checkNewGalaxy(galaxy, empty).map((c) => c.level)).toEqual(['ok', 'ok'])
  })

  it('is held against its neighbour on the sky', () => {
    const [, near] = checkNewGalaxy(galaxy, { ...empty, near: [{ name: 'Ostrel IX', separationArcsec: 41.6, halfLightArcmin: null }] })
    expect(near).toMatchObject({ check: 'near-galaxy', level: 'warn' })
    expect(near?.sentence).toContain('Ostrel IX is only 42″ away')
  })

  it('within another’s half-light radius may be a part of it, beside it is not', () => {
    const large = (separationArcsec: number) => checkNewGalaxy(galaxy, { ...empty, near: [{ name: 'Ostrel', separationArcsec, halfLightArcmin: 9 }] })[1]
    expect(large(500)).toMatchObject({ level: 'warn', sentence: 'It lies within the half-light radius of Ostrel, 8.3′ from its centre: is it a galaxy, or a part of that one?' })
    expect(large(560)).toMatchObject({ level: 'ok' })
  })

  it('of which nothing is measured is asked about', () => {
    expect(checkNewGalaxy(galaxy, { ...empty, measurements: 0 }).find((c) => c.check === 'bare-galaxy')).toMatchObject({ level: 'warn' })
  })

  it('whose designation is made from a position must have its digits truncated', () => {
    // RA 175.5301° = 11h 42m 07.224s; Dec 23.2617° = +23° 15′ 42.12″: J114207.2+231542, and J1142+2315; rounded to minutes it would be J1142+2316.
    const said = (designation: string) => checkNewGalaxy({ ...galaxy, designation }, empty).find((c) => c.check === 'designation-digits')
    for (const right of ['Demo J114207.2+231542', 'Demo J1142+2315', 'DJ114207+231542', 'Demo J1142.1+2315']) expect(said(right), right).toMatchObject({ level: 'ok' })
    expect(said('Demo J1142+2316')).toMatchObject({ level: 'warn', sentence: expect.stringContaining('are rounded') as unknown })
    for (const wrong of ['Demo J1143+2315', 'Demo J1142-2315', 'Demo J114217.2+231542']) expect(said(wrong), wrong).toMatchObject({ level: 'warn', sentence: expect.stringContaining('are not those of its position') as unknown })
    expect(said('Ostrel XI')).toBeUndefined()
  })

  it('cannot take the name of another', () => {
    const [name] = checkNewGalaxy(galaxy, { ...empty, borne: [{ name: 'Marl 7', galaxy: 'Ostrel IX' }] })
    expect(name).toMatchObject({ check: 'name-borne', level: 'stop' })
    expect(name?.sentence).toContain('“Marl 7” is a name of Ostrel IX already')
  })
})
