import { describe, expect, it } from 'vitest'
import { guessMapping } from '../../../core/formats/guess-mapping.ts'
import { rowReader } from '../../../core/formats/import-row.ts'
import { mappingSchema } from '../../../core/schema/imports.ts'
import type { Mapping } from '../../../core/schema/imports.ts'
import { DEFAULT_ANCHORS } from '../../../core/scale/anchors.ts'

const LONG = ['galaxy', 'ra_deg', 'dec_deg', 'quantity', 'value', 'err_plus', 'err_minus', 'err_sys', 'unit', 'method', 'anchor', 'anchor_value_assumed', 'source', 'note']
const read = (headers: string[], cells: string[], change: (mapping: Mapping) => void = () => undefined) => {
  const mapping = guessMapping(headers, [cells])
  change(mapping)
  return rowReader({ headers, mapping, anchors: DEFAULT_ANCHORS })(cells)
}

describe('the mapping guessed from the heads', () => {
  it('knows a long table', () => {
    expect(guessMapping(LONG, []).columns.map((c) => c.role)).toEqual([
      'galaxy', 'ra', 'dec', 'quantity', 'value', 'err_plus', 'err_minus', 'err_sys', 'unit', 'method', 'anchor', 'anchor_value_assumed', 'source', 'note',
    ])
  })

  it('knows a wide table, its units and its error columns', () => {
    const mapping = guessMapping(['Name', 'RAJ2000', 'DEJ2000', 'Dist (Mpc)', 'e_Dist', 'Vh [km/s]', 'V (mag)', 'e_foo', 'dm_mpc', 'Ref'], [])
    expect(mapping.columns).toEqual([
      { role: 'galaxy', unit: '' }, { role: 'ra', unit: '' }, { role: 'dec', unit: '' }, { role: 'value:distance_modulus', unit: 'Mpc' },
      { role: 'err:distance_modulus', unit: '' }, { role: 'value:velocity', unit: 'km/s' }, { role: 'ignore', unit: '' }, { role: 'ignore', unit: '' },
      { role: 'ignore', unit: '' }, { role: 'source', unit: '' },
    ])
    expect(mappingSchema.parse(mapping)).toEqual(mapping)
  })

  it('takes the first column of words for the names when no head says so', () => {
    const mapping = guessMapping(['n', 'who', 'dm'], [['1', 'Ostrel IX', '27.7'], ['2', 'Ostrel X', '27.8']])
    expect(mapping.columns.map((c) => c.role)).toEqual(['ignore', 'galaxy', 'value:distance_modulus'])
  })
})

describe('a row of a long table', () => {
  it('becomes a measurement', () => {
    const row = read(LONG, ['NGC 300', '13.722917', '−37.684444', 'distance modulus', '26.37', '0.05', '0.05', '0.03', 'mag', 'Cepheids', 'LMC modulus', '18.50', 'Gieren+2005 ApJ 628 695', ''])
    expect(row.problems).toEqual([])
    expect(row).toMatchObject({ galaxy: 'NGC 300', ra: 13.722917, dec: -37.684444, source: 'Gieren+2005 ApJ 628 695' })
    expect(row.measurements).toMatchObject([
      { quantity: 'distance_modulus', value: 26.37, errPlus: 0.05, errMinus: 0.05, errSys: 0.03, unit: 'mag', method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: 18.5 },
    ])
  })

  it('reads a text quantity, and the class that it suggests', () => {
    const row = read(LONG, ['Ostrel IX', '', '', 'morphology', 'dSph', '', '', '', '', '', '', '', 'Ref+2020', 'seen'])
    expect(row).toMatchObject({ galaxyClass: 'dwarf-spheroidal', problems: [], measurements: [{ textValue: 'dSph', value: null, note: 'seen' }] })
  })

  it.each([
    ['a quantity that is none', { 3: 'charm' }, 'quantity', 'no quantity that the catalogue keeps'],
    ['a value that is none', { 4: 'faint' }, 'value', 'cannot be read as a value'],
    ['no value', { 4: '' }, 'value', 'gives no distance modulus'],
    ['a unit that is none', { 8: 'furlongs' }, 'unit', 'is given in mag or Mpc or kpc'],
    ['a value outside the Local Volume', { 4: '260' }, 'value', 'outside 14 to 33'],
    ['a value with its unit slipped', { 4: '3.61' }, 'value', 'outside 14 to 33'],
    ['a method that is none', { 9: 'guess' }, 'method', 'no distance method'],
    ['no method', { 9: '' }, 'method', 'names no distance method'],
    ['an anchor that is none', { 10: 'Sirius' }, 'anchor', 'has no anchor'],
    ['an error that is none', { 5: 'tiny' }, 'err_plus', 'cannot be read'],
    ['a declination that is none', { 2: '-97' }, 'dec_deg', 'Declination'],
    ['half a position', { 2: '' }, 'dec_deg', 'both right ascension and declination'],
    ['no galaxy', { 0: '' }, 'galaxy', 'names no galaxy'],
  ])('names the column and the reason of %s', (_what, spoilt, column, words) => {
    const cells = ['NGC 300', '13.72', '-37.68', 'distance modulus', '26.37', '0.05', '0.05', '', 'mag', 'Cepheids', 'LMC modulus', '18.50', 'Gieren+2005', '']
    for (const [at, text] of Object.entries(spoilt)) cells[Number(at)] = text
    const { problems } = read(LONG, cells)
    expect(problems.map((p) => p.column)).toContain(column)
    expect(problems.map((p) => p.message).join(' ')).toContain(words)
  })

  it('says how many cells a ragged row has', () => {
    expect(read(LONG, ['NGC 300', '13.7']).problems).toEqual([{ column: null, message: expect.stringContaining('2 cells where the head of the table has 14') as string }])
  })

  it('takes what holds for all rows where a cell is empty', () => {
    const row = read(['galaxy', 'value'], ['NGC 300', '26.37 ± 0.05'], (mapping) => {
      Object.assign(mapping.constants, { quantity: 'distance_modulus', method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: -4.05 })
      mapping.columns = [{ role: 'galaxy', unit: '' }, { role: 'value', unit: '' }]
    })
    expect(row.problems).toEqual([])
    expect(row.measurements).toMatchObject([{ value: 26.37, errPlus: 0.05, errMinus: 0.05, method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: -4.05 }])
  })
})

describe('a row of a wide table', () => {
  it('gives a measurement for each column of values that is not empty', () => {
    const row = read(['Name', 'Dist (Mpc)', 'e_Dist', 'method', 'v_hel', 'Type', 'Vmag'], ['Ostrel IX', '3.60(5)', '', 'TRGB', '−120 ± 3', 'dIrr', '--'])
    expect(row.problems).toEqual([])
    expect(row.measurements).toMatchObject([
      { quantity: 'distance_modulus', value: 3.6, errPlus: 0.05, unit: 'Mpc', method: 'trgb' },
      { quantity: 'velocity', value: -120, errPlus: 3, method: null },
      { quantity: 'morphology', textValue: 'dIrr' },
    ])
    expect(row.galaxyClass).toBe('dwarf-irregular')
  })

  it('says that a row holds nothing', () => {
    expect(read(['Name', 'Dist (Mpc)'], ['Ostrel IX', '']).problems).toEqual([{ column: null, message: 'The row holds no value.' }])
  })
})
