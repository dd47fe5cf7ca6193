import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cellText, rowsToTsv, sortRows, type DataColumn } from '../../src/components/data-column.ts'

interface Galaxy {
  name: string
  distance: number | null
}

const name: DataColumn<Galaxy> = { key: 'name', header: 'Name', text: (row) => row.name }
const distance: DataColumn<Galaxy> = { key: 'distance', header: 'D', unit: 'Mpc', decimals: 2, text: (row) => row.distance }

const galaxies: Galaxy[] = [
  { name: 'Ostrel X', distance: 3.6 },
  { name: 'Ostrel 10', distance: null },
  { name: 'Ostrel 9', distance: -1.25 },
  { name: 'ansel', distance: 3.6 },
]

describe('sorting a table', () => {
  it('puts missing values last in both directions', () => {
    expect(sortRows(galaxies, distance, 'ascending').at(-1)?.name).toBe('Ostrel 10')
    expect(sortRows(galaxies, distance, 'descending').at(-1)?.name).toBe('Ostrel 10')
  })

  it('reads numbers within names and does not mind capitals', () => {
    expect(sortRows(galaxies, name, 'ascending').map((row) => row.name)).toEqual(['ansel', 'Ostrel 9', 'Ostrel 10', 'Ostrel X'])
  })

  it('keeps every row, keeps the order of equals, and is in order', () => {
    const rows = fc.array(fc.record({ name: fc.string(), distance: fc.option(fc.integer({ min: -3, max: 3 })) }))
    fc.assert(
      fc.property(rows, (list) => {
        const sorted = sortRows(list, distance, 'ascending')
        expect(sorted).toHaveLength(list.length)
        for (let i = 1; i < sorted.length; i += 1) {
          const before = sorted[i - 1]
          const after = sorted[i]
          if (!before || !after) throw new Error('a hole in the list')
          if (before.distance === null) expect(after.distance).toBeNull()
          else if (after.distance !== null) expect(before.distance).toBeLessThanOrEqual(after.distance)
          if (before.distance === after.distance) expect(list.indexOf(before)).toBeLessThan(list.indexOf(after))
        }
      }),
    )
  })
})

describe('copying a table', () => {
  it('gives full values under heads with units, empty where missing', () => {
    expect(rowsToTsv([name, distance], galaxies.slice(0, 2))).toBe('Name\tD (Mpc)\nOstrel X\t3.6\nOstrel 10\t')
  })

  it('keeps a row on one line', () => {
    expect(rowsToTsv([name], [{ name: 'a\tb\nc', distance: 1 }])).toBe('Name\na b c')
  })

  it('shows numbers with their decimals and a true minus', () => {
    expect(galaxies.map((row) => cellText(distance, row))).toEqual(['3.60', null, '\u22121.25', '3.60'])
  })
})
