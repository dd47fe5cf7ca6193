import { describe, expect, it } from 'vitest'
import type { MeasurementSurroundings } from '../../../core/checks/check.ts'
import { checkAmendment, checkAnchor, checkExclusion, checkMeasurement } from '../../../core/checks/run.ts'
import type { Measurement } from '../../../core/catalogue/types.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import { DEFAULT_ANCHORS } from '../../../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import type { QuantityKey } from '../../../core/quantities.ts'

const scale = { anchors: DEFAULT_ANCHORS, policy: DEFAULT_POLICY }
let nextId = 1
const held = (quantity: QuantityKey, value: number, more: Partial<Measurement> = {}): Measurement => {
  const id = nextId++
  return {
    id, versionId: id, galaxyId: 1, quantity, value, errPlus: 0.05, errMinus: 0.05, errSys: null, textValue: null, limitFlag: null, method: quantity === 'distance_modulus' ? 'trgb' : null,
    anchor: quantity === 'distance_modulus' ? 'trgb-absolute-i' : null, anchorValueAssumed: quantity === 'distance_modulus' ? -4.049 : null, convention: null, published: null, sourceId: id,
    sourceLabel: `Marl ${id}`, sourceYear: 2000, locator: null, note: null, excludedReason: null, supersedes: null, ...more,
  }
}
const typed = (quantity: QuantityKey, value: number, more: Partial<MeasurementInput> = {}): MeasurementInput => ({
  quantity, value, errPlus: 0.06, errMinus: 0.06, errSys: null, unit: '', textValue: null, limitFlag: null, method: quantity === 'distance_modulus' ? 'trgb' : null,
  anchor: quantity === 'distance_modulus' ? 'trgb-absolute-i' : null, anchorValueAssumed: quantity === 'distance_modulus' ? -4.049 : null, convention: null, sourceId: 99, locator: null, note: null, supersedes: null, ...more,
})
const around = (list: readonly Measurement[], more: Partial<MeasurementSurroundings> = {}): MeasurementSurroundings => ({
  galaxy: 'Ostrel IX', position: { ra: 150, dec: 20 }, held: list, scale, sourceLabel: 'Quill 2025', sourceLacks: [], elsewhere: [], outlook: null, ...more,
})
function said(check: string, measurement: MeasurementInput, surroundings: MeasurementSurroundings): string | undefined {
  const found = checkMeasurement({ measurement, replaces: null }, surroundings).find((c) => c.check === check)
  return found && `${found.level}: ${found.sentence}`
}
const near = held('distance_modulus', 27.8)

describe('digit-slip', () => {
  it('suggests the other sign of a velocity, another digit, another decimal point', () => {
    const v = around([held('velocity', -212, { errPlus: 2, errMinus: 2 })])
    const speed = (value: number) => said('digit-slip', typed('velocity', value, { errPlus: 2, errMinus: 2 }), v)
    expect(speed(212)).toMatch(/^warn: .*with the other sign it would fit/)
    expect(speed(-312)).toContain('with another digit (−212.0) it would fit')
    expect(speed(-2121)).toContain('with the decimal point elsewhere (−212.1)')
    expect(speed(-214)).toBeUndefined()
    expect(speed(-260)).toBeUndefined()
    const sizes = around([held('r_half', 0.52)])
    expect(said('digit-slip', typed('r_half', 5.1), sizes)).toContain('with the decimal point elsewhere (0.51)')
    const mags = around([held('v_mag', 14.32)])
    expect(said('digit-slip', typed('v_mag', 15.33), mags)).toContain('with another digit (14.33)')
    expect(said('digit-slip', typed('v_mag', 14.9), mags)).toBeUndefined()
    expect(said('digit-slip', typed('distance_modulus', 28.8), around([near]))).toContain('with another digit (27.800)')
  })

  it('has nothing to say where nothing is held', () => {
    expect(said('digit-slip', typed('velocity', 212), around([]))).toBeUndefined()
  })
})

describe('error-bar', () => {
  it('asks about errors that nobody has: none at all, larger than the value, lopsided, too fine for the method', () => {
    expect(said('error-bar', typed('distance_modulus', 27.8, { errPlus: 0, errMinus: 0 }), around([]))).toContain('counts as none')
    expect(said('error-bar', typed('r_half', 0.5, { errPlus: 0.6, errMinus: 0.6 }), around([]))).toContain('should it be a limit')
    expect(said('error-bar', typed('distance_modulus', 27.8, { errPlus: 0.5, errMinus: 0.04 }), around([]))).toContain('differ more than 10 times')
    expect(said('error-bar', typed('distance_modulus', 27.8, { method: 'tully-fisher', errPlus: 0.04, errMinus: 0.04 }), around([]))).toContain('finer than Tully–Fisher distances are')
    expect(said('error-bar', typed('velocity', 27.8, { errPlus: 30, errMinus: 30 }), around([]))).toMatch(/^ok/)
  })
})

describe('agreement', () => {
  it('leaves the systematic error that two values by one method have in common out', () => {
    // 0.3 mag apart, 0.06 and 0.05 of their own: 3.8 σ. The 0.06 of method and anchor moves both.
    expect(said('agreement', typed('distance_modulus', 28.1), around([near]))).toMatch(/^warn: 3\.8 σ/)
    // Against Cepheids each has its own: sqrt(0.06² + 0.05² + 0.0564² + 0.05²) = 0.109: 2.8 σ.
    const cepheids = held('distance_modulus', 27.8, { method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: 18.477 })
    expect(said('agreement', typed('distance_modulus', 28.1), around([cepheids]))).toMatch(/^ok: 2\.8 σ/)
  })

  it('adds what adoption does where the anchor’s value is not known', () => {
    // 0.3 mag apart: 0.06, 0.05 and 0.05 for the unknown scale: 3.2 σ.
    expect(said('agreement', typed('distance_modulus', 28.1, { anchor: null, anchorValueAssumed: null }), around([near]))).toMatch(/^warn: 3\.2 σ/)
  })

  it('says nothing of a limit', () => {
    expect(said('agreement', typed('velocity', 900, { limitFlag: 'upper' }), around([held('velocity', 200)]))).toBeUndefined()
  })
})

describe('elsewhere', () => {
  it('asks when another galaxy has the very value', () => {
    expect(said('elsewhere', typed('velocity', 212), around([], { elsewhere: ['Ostrel X'] }))).toBe('warn: Quill 2025 has the very same heliocentric velocity, error and all, for Ostrel X. Is this row that of Ostrel IX?')
    expect(said('elsewhere', typed('velocity', 212), around([], { elsewhere: ['Ostrel X', 'Marl', 'Marl II'] }))).toContain('Ostrel X and 2 more')
    expect(said('elsewhere', typed('velocity', 212), around([]))).toBeUndefined()
  })
})

describe('source-complete', () => {
  it('names what the source lacks', () => {
    expect(said('source-complete', typed('velocity', 212), around([], { sourceLacks: ['a DOI, bibcode or address', 'its authors'] }))).toBe('warn: Quill 2025 lacks a DOI, bibcode or address and its authors. Complete the source, so that others find it.')
    expect(said('source-complete', typed('velocity', 212), around([]))).toBeUndefined()
  })
})

describe('velocity-distance', () => {
  // Towards RA 150°, Dec +20° (l 215.2°, b +50.6°) the Sun's motion in the Local Group's frame is −88 km/s (Karachentsev & Makarov 1996, worked by hand).
  it('asks when the two cannot be one galaxy’s', () => {
    expect(said('velocity-distance', typed('velocity', 330), around([near]))).toMatch(/^ok: Velocity and distance go together: 2\d\d km\/s .* 3\.63 Mpc .* 245 km\/s/)
    expect(said('velocity-distance', typed('velocity', 1800), around([near]))).toMatch(/^warn: 1\d{3} km\/s/)
    expect(said('velocity-distance', typed('distance_modulus', 24.5), around([held('velocity', 900)]))).toMatch(/^warn/)
  })

  it('needs both, and a place', () => {
    expect(said('velocity-distance', typed('velocity', 330), around([]))).toBeUndefined()
    expect(said('velocity-distance', typed('velocity', 330), around([near], { position: null }))).toBeUndefined()
    expect(said('velocity-distance', typed('v_mag', 14), around([near]))).toBeUndefined()
  })
})

describe('unlikely-galaxy', () => {
  it('asks about what would be no galaxy: too bright, too large, too small, too much gas', () => {
    expect(said('unlikely-galaxy', typed('v_mag', 1.2), around([near]))).toContain('an absolute V magnitude of \u221226.6')
    expect(said('unlikely-galaxy', typed('r_half', 50, { errPlus: 1, errMinus: 1 }), around([near]))).toContain('half-light radius of 52800 pc')
    expect(said('unlikely-galaxy', typed('hi_flux', 90000, { errPlus: 10, errMinus: 10 }), around([near]))).toContain('H I mass of 10^11.4')
    expect(said('unlikely-galaxy', typed('v_mag', 14), around([near]))).toBeUndefined()
    expect(said('unlikely-galaxy', typed('v_mag', 1.2), around([]))).toBeUndefined()
    // The distance is what makes it so.
    expect(said('unlikely-galaxy', typed('distance_modulus', 32), around([held('v_mag', 6)]))).toContain('absolute V magnitude of \u221226.0')
  })
})

describe('a surface brightness', () => {
  it('that no galaxy has shows a tenfold radius or a slip of magnitudes, without a distance', () => {
    // V = 16 in 2.5′: 16 + 1.995 + 5 log10(150″) = 28.9; in 25′ 33.9; in 0.005′ 15.4.
    const light = around([held('v_mag', 16)])
    expect(said('unlikely-galaxy', typed('r_half', 2.5), light)).toBeUndefined()
    expect(said('unlikely-galaxy', typed('r_half', 25), light)).toContain('mean surface brightness of 33.9 mag/arcsec²')
    expect(said('unlikely-galaxy', typed('r_half', 0.005), light)).toContain('15.4 mag/arcsec²')
  })
})

describe('unit-slip', () => {
  it('finds seconds typed for minutes of arc in a small galaxy too', () => {
    expect(said('unit-slip', typed('r_half', 0.31, { unit: 'arcsec' }), around([held('r_half', 0.3)]))).toContain('as 0.31 arcmin it would fit')
  })
})

describe('method-reach', () => {
  it('asks about methods far out of their range', () => {
    expect(said('method-reach', typed('distance_modulus', 29, { method: 'rr-lyrae' }), around([]))).toContain('farther than RR Lyrae distances usually reach')
    expect(said('method-reach', typed('distance_modulus', 24.4, { method: 'hubble-flow' }), around([]))).toContain('rival the flow')
    expect(said('method-reach', typed('distance_modulus', 24.4, { method: 'rr-lyrae' }), around([]))).toBeUndefined()
    expect(said('method-reach', typed('distance_modulus', 29), around([]))).toBeUndefined()
  })
})

describe('host-change', () => {
  const outlook = (own: { before: string | null; after: string | null }, satellites: { name: string; before: string | null; after: string | null }[] = []) =>
    said('host-change', typed('distance_modulus', 27.8), around([], { outlook: { own, satellites } }))
  it('says who would belong to whom', () => {
    expect(outlook({ before: 'Ostrel', after: 'Ostrel' })).toBe('ok: Nobody changes host.')
    expect(outlook({ before: null, after: 'Ostrel' })).toBe('warn: Ostrel IX would become a satellite of Ostrel.')
    expect(outlook({ before: 'Ostrel', after: null })).toBe('warn: Ostrel IX would leave Ostrel and stand in the field.')
    expect(outlook({ before: 'Ostrel', after: 'Marl' })).toBe('warn: Ostrel IX would pass from Ostrel to Marl.')
    expect(outlook({ before: null, after: null }, [{ name: 'Marl II', before: 'Ostrel IX', after: null }, { name: 'Marl III', before: 'Ostrel IX', after: null }])).toBe('warn: 2 other galaxies change host with it: Marl II, Marl III.')
    expect(said('host-change', typed('velocity', 200), around([]))).toBeUndefined()
    expect(said('host-change', typed('distance_modulus', 27.8), around([], { outlook: 'many' }))).toMatch(/^ok: Among so many changes/)
  })
})

describe('an exclusion', () => {
  it('of the only value that counts is asked about', () => {
    const only = held('distance_modulus', 27.8)
    expect(checkExclusion(only, [only, held('velocity', 200)], scale)).toMatchObject({ check: 'last-value', level: 'warn', sentence: 'It is the only distance modulus that counts: without it the galaxy has none, nor a place among hosts.' })
    expect(checkExclusion(only, [only, held('distance_modulus', 27.9)], scale)).toMatchObject({ level: 'ok' })
    const limit = held('distance_modulus', 27.9, { limitFlag: 'upper' })
    expect(checkExclusion(only, [only, limit], scale)).toMatchObject({ level: 'warn' })
  })
})

describe('an amendment', () => {
  const amended = (ra: number, names: string[] = []) => checkAmendment({ galaxy: 'Ostrel IX', position: { ra: 150, dec: 0 }, moved: { ra, dec: 0 }, names, halfLightArcmin: 2 })
  it('that moves a galaxy out of itself is asked about', () => {
    expect(amended(150)).toEqual([])
    expect(amended(150 + 1.5 / 60)).toMatchObject([{ check: 'position-moved', level: 'ok', sentence: 'The position moves by 90.0″.' }])
    expect(amended(150 + 5 / 60)).toMatchObject([{ level: 'warn', sentence: 'The position of Ostrel IX moves by 5.0′, out of the galaxy itself. Is it another galaxy’s?' }])
  })

  it('that gives a name looks at its digits', () => {
    expect(amended(150, ['Demo J1000+0000'])).toMatchObject([{ check: 'designation-digits', level: 'ok' }])
    expect(amended(150, ['Demo J1001+0000'])).toMatchObject([{ check: 'designation-digits', level: 'warn' }])
  })
})

describe('an anchor', () => {
  const trgb = { label: 'TRGB absolute I magnitude', value: -4.049, err: 0.038 }
  it('that moves by more than three times its error is asked about', () => {
    expect(checkAnchor({ before: trgb, after: { ...trgb, value: -3.999 } })).toMatchObject([{ check: 'anchor-shift', level: 'ok', sentence: 'TRGB absolute I magnitude moves by +0.050 mag, 1.3 times its error.' }])
    expect(checkAnchor({ before: trgb, after: { ...trgb, value: -4.249 } })).toMatchObject([{ level: 'warn', sentence: expect.stringContaining('\u22120.200 mag, 5.3 times') as unknown }])
    expect(checkAnchor({ before: null, after: trgb })).toMatchObject([{ level: 'ok' }])
    expect(checkAnchor({ before: trgb, after: { ...trgb, err: 0 } })).toMatchObject([{ level: 'warn' }])
    expect(checkAnchor({ before: trgb, after: { ...trgb } })).toEqual([])
  })
})
