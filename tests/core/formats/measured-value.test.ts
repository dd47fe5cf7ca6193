import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readMeasuredValue } from '../../../core/formats/measured-value.ts'

const none = { kind: 'value', errPlus: null, errMinus: null, errSys: null, limitFlag: null, unit: '' }

describe('a value with its error bars', () => {
  it.each([
    ['27.78', { value: 27.78 }],
    ['27.78 ± 0.05', { value: 27.78, errPlus: 0.05, errMinus: 0.05 }],
    ['27.78+/-0.05 mag', { value: 27.78, errPlus: 0.05, errMinus: 0.05, unit: 'mag' }],
    ['27.78 +- 0.05', { value: 27.78, errPlus: 0.05, errMinus: 0.05 }],
    ['27.78 +0.06 -0.04', { value: 27.78, errPlus: 0.06, errMinus: 0.04 }],
    ['27.78 +0.06 −0.04 mag', { value: 27.78, errPlus: 0.06, errMinus: 0.04, unit: 'mag' }],
    ['27.78 -0.04 +0.06', { value: 27.78, errPlus: 0.06, errMinus: 0.04 }],
    ['27.78+0.06/-0.04', { value: 27.78, errPlus: 0.06, errMinus: 0.04 }],
    ['3.60(5) Mpc', { value: 3.6, errPlus: 0.05, errMinus: 0.05, unit: 'Mpc' }],
    ['3.60(0.07) Mpc', { value: 3.6, errPlus: 0.07, errMinus: 0.07, unit: 'Mpc' }],
    ['360(12)', { value: 360, errPlus: 12, errMinus: 12 }],
    ['18.477 ± 0.004 ± 0.026', { value: 18.477, errPlus: 0.004, errMinus: 0.004, errSys: 0.026 }],
    ['18.477 ± 0.004 (stat) ± 0.026 (sys)', { value: 18.477, errPlus: 0.004, errMinus: 0.004, errSys: 0.026 }],
    ['−300', { value: -300 }],
    ['–48.5 km/s', { value: -48.5, unit: 'km/s' }],
    ['5e10 Msun', { value: 5e10, unit: 'Msun' }],
    ['1.3E-05', { value: 1.3e-5 }],
    ['.5', { value: 0.5 }],
    ['< 1.2 mag', { value: 1.2, limitFlag: 'upper', unit: 'mag' }],
    ['≥ 3', { value: 3, limitFlag: 'lower' }],
    ['27.78\u202f±\u202f0.05\u202fmag', { value: 27.78, errPlus: 0.05, errMinus: 0.05, unit: 'mag' }],
    ['16.6′', { value: 16.6, unit: '′' }],
    ['3.61 [Mpc]', { value: 3.61, unit: 'Mpc' }],
  ])('reads %s', (text, expected) => {
    expect(readMeasuredValue(text)).toEqual({ ...none, ...expected })
  })

  it.each(['', '  ', '-', '--', '...', '…', 'nan', 'NULL', 'n/a'])('takes "%s" for no value', (text) => {
    expect(readMeasuredValue(text)).toEqual({ kind: 'missing' })
  })

  it.each(['abc', '27,78', '1.2.3', '27.78 ± ', '~3', '12 34', '1e999', '27.78 ± 0.1 ± 0.2 ± 0.3', 'Mpc 3'])('refuses "%s" with a sentence', (text) => {
    const read = readMeasuredValue(text)
    expect(read).toMatchObject({ kind: 'unreadable' })
    expect(read.kind === 'unreadable' ? read.why : '').toMatch(/^".+" cannot be read as a value: .+\.$/)
  })

  it('reads back what it is given, for any value and error bars', () => {
    const number = fc.double({ min: 1e-6, max: 1e6, noNaN: true })
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), number, number, (value, up, down) => {
        const read = readMeasuredValue(`${value} +${up} -${down} mag`)
        expect(read).toMatchObject({ kind: 'value', value: value === 0 ? expect.any(Number) : value, errPlus: up, errMinus: down, unit: 'mag' })
      }),
    )
  })

  it('never throws and never makes a number of what is none', () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        const read = readMeasuredValue(text)
        if (read.kind === 'value') expect(Number.isFinite(read.value)).toBe(true)
      }),
      { numRuns: 2000 },
    )
  })
})
