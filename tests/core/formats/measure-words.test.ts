import { describe, expect, it } from 'vitest'
import { canonicalWords, labelInSentence, measureWords, numberWords } from '../../../core/formats/measure-words.ts'

const plain = (words: string): string => words.replaceAll('\u00a0', ' ')

describe('measurements in words', () => {
  it.each([
    [{ value: 27.78, errPlus: 0.05, errMinus: 0.05, unit: 'mag' }, '27.78 ± 0.05 mag'],
    [{ value: 3.61, errPlus: 0.09, errMinus: 0.08, unit: 'Mpc' }, '3.61 +0.09 −0.08 Mpc'],
    [{ value: 18.477, errPlus: 0.004, errMinus: 0.004, errSys: 0.026, unit: 'mag' }, '18.477 ± 0.004 ± 0.026 (sys) mag'],
    [{ value: -300, unit: 'km/s' }, '−300 km/s'],
    [{ value: 1.2, limitFlag: 'upper' as const, unit: 'mag' }, '< 1.2 mag'],
    [{ value: 3, errPlus: 1, errMinus: null, unit: '' }, '3 +1'],
    [{ value: null, unit: 'mag' }, '—'],
    [{ value: null, textValue: 'SA(s)b', unit: '' }, 'SA(s)b'],
  ])('prints %j', (measure, words) => {
    expect(plain(measureWords(measure))).toBe(words)
  })

  it('rounds to the decimals of the quantity, and knows no negative nought', () => {
    expect(plain(canonicalWords('distance_modulus', { value: 27.77771, errPlus: 0.05123, errMinus: 0.05117 }))).toBe('27.778 ± 0.051 mag')
    expect(plain(canonicalWords('velocity', { value: -0.01 }))).toBe('0.0 km/s')
    expect(numberWords(-0, 1)).toBe('0.0')
    expect(numberWords(5e10, 0)).toBe('50000000000')
    expect(numberWords(1.3e-9, 0)).toBe('1.3e−9')
  })

  it('keeps the capitals that a sentence must not lower', () => {
    expect(['Distance modulus', 'B magnitude', 'H I flux', 'Hubble stage T'].map(labelInSentence)).toEqual(['distance modulus', 'B magnitude', 'H I flux', 'Hubble stage T'])
  })
})
