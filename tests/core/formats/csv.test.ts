import { parse } from 'csv-parse/sync'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { columnOf, type CatalogueValue, type Column } from '../../../core/columns.ts'
import { csvWriter } from '../../../core/formats/csv.ts'

const columns = ['name', 'class', 'dec', 'n_distance', 'updated_at'].map((key) => columnOf(key)).filter((c): c is Column => c !== undefined)
const writer = csvWriter(columns)
const written = (...rows: CatalogueValue[][]): string => writer.begin() + rows.map((row) => writer.row(row)).join('') + writer.end()

describe('CSV', () => {
  it('begins with the column keys and ends every line with CRLF', () => {
    expect(written(['Ostrel', 'spiral', 41.25, 3, '2026-01-01T00:00:00Z'])).toBe('name,class,dec,n_distance,updated_at\r\nOstrel,spiral,41.25,3,2026-01-01T00:00:00Z\r\n')
    expect(writer.mediaType).toBe('text/csv; charset=utf-8; header=present')
  })

  it('leaves a missing value empty, and a negative number a number', () => {
    expect(writer.row(['Tarn', null, -41.3, null, null])).toBe('Tarn,,-41.3,,\r\n')
  })

  it.each(['=1+1', '+1', '-2', '@SUM(A1)', '\tx', '\rx'])('takes the edge off the text %j', (text) => {
    expect(writer.row([text, null, null, null, null]).replace(/^"/, '').startsWith(`'${text.charAt(0)}`)).toBe(true)
  })

  it('keeps every text and every digit', () => {
    const text = fc.string({ unit: 'binary', minLength: 1 }).filter((s) => !/^[=+\-@\t\r]/.test(s))
    const row = fc.tuple(text, fc.double({ noNaN: true, noDefaultInfinity: true }).map((n) => n + 0))
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 5 }), (rows) => {
        const back = parse(written(...rows.map(([name, dec]) => [name, 'spiral', dec, 1, null])), { columns: true, relax_quotes: false, record_delimiter: '\r\n' }) as Record<string, string>[]
        expect(back.map((r) => [r.name, Number(r.dec)])).toEqual(rows)
      }),
    )
  })
})
