import { describe, expect, it } from 'vitest'
import { formatAge, formatBytes, formatCount, formatCounted, formatMeasure, formatNumber, formatPercent, formatSigned, unitText } from '../../src/lib/format.ts'

const plain = (text: string): string => text.replace(/[\u00a0\u202f]/g, ' ')

describe('numbers for people', () => {
  it('have a true minus and never a negative zero', () => {
    expect(formatNumber(-9.44, 1)).toBe('\u22129.4')
    expect(formatNumber(-0.001, 2)).toBe('0.00')
    expect(formatNumber(Number.NaN)).toBe('—')
    expect(formatNumber(null)).toBe('—')
  })

  it('carry a sign where they are differences', () => {
    expect(formatSigned(0.25)).toBe('+0.25')
    expect(formatSigned(-169, 0)).toBe('\u2212169')
    expect(formatSigned(undefined)).toBe('—')
  })

  it('part thousands from five digits on', () => {
    expect(plain(formatCount(1500))).toBe('1500')
    expect(plain(formatCount(1234567))).toBe('1 234 567')
    expect(formatCounted(1, 'galaxy', 'galaxies')).toBe('1 galaxy')
    expect(formatCounted(0, 'row')).toBe('0 rows')
  })

  it('percentages and file sizes', () => {
    expect(plain(formatPercent(0.314))).toBe('31 %')
    expect(plain(formatBytes(812))).toBe('812 B')
    expect(plain(formatBytes(1_400_000))).toBe('1.4 MB')
  })
})

describe('measures', () => {
  it('show unequal errors apart and equal ones as ±', () => {
    expect(plain(formatMeasure({ value: 3.61, plus: 0.09, minus: 0.08, unit: 'Mpc' }))).toBe('3.61 +0.09 \u22120.08 Mpc')
    expect(plain(formatMeasure({ value: 27.77, plus: 0.05, minus: 0.05, unit: 'mag' }))).toBe('27.77 ± 0.05 mag')
    expect(plain(formatMeasure({ value: 27.77, plus: 0.05, unit: 'mag' }))).toBe('27.77 ± 0.05 mag')
  })

  it('compare errors as they are printed', () => {
    expect(plain(formatMeasure({ value: 1, plus: 0.101, minus: 0.099 }))).toBe('1.00 ± 0.10')
  })

  it('say a missing value with a dash, whatever its errors', () => {
    expect(formatMeasure({ value: null, plus: 1, unit: 'Mpc' })).toBe('—')
  })

  it('write units as people do', () => {
    expect(plain(unitText('km/s'))).toBe('km s⁻¹')
    expect(unitText('Mpc')).toBe('Mpc')
  })
})

describe('ages', () => {
  const now = new Date('2026-11-18T12:00:00Z')
  it.each([
    ['2026-11-18T11:59:40Z', 'just now'],
    ['2026-11-18T11:48:00Z', '12 min'],
    ['2026-11-18T07:00:00Z', '5 h'],
    ['2026-11-15T12:00:00Z', '3 d'],
    ['2026-10-01T12:00:00Z', '1 Oct 2026'],
    ['not a date', '—'],
  ])('%s is %s', (moment, words) => {
    expect(plain(formatAge(moment, now))).toBe(words)
  })
})
