/** Comma-separated values by RFC 4180: a header line, CRLF, quotes doubled, full precision. */
import type { CatalogueValue, Column } from '../columns.ts'
import type { TableWriter } from './table-writer.ts'

/** What a spreadsheet would run as a formula when a cell begins with it (OWASP, CSV injection). */
const FORMULA = /^[=+\-@\t\r]/

/**
 * Text that a spreadsheet takes for a formula gets an apostrophe before it, which spreadsheets do not show. Numbers are never touched: a
 * declination of −41.3 stays a number.
 */
function cell(value: CatalogueValue | undefined, isText: boolean): string {
  if (value === null || value === undefined) return ''
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : ''
  const safe = isText && FORMULA.test(value) ? `'${value}` : value
  return /[",\r\n]|^\s|\s$/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe
}

export function csvWriter(columns: readonly Column[]): TableWriter {
  const isText = columns.map((column) => column.type === 'text' || column.type === 'choice')
  return {
    mediaType: 'text/csv; charset=utf-8; header=present',
    begin: () => `${columns.map((column) => column.key).join(',')}\r\n`,
    row: (values) => `${columns.map((_, i) => cell(values[i], isText[i] ?? true)).join(',')}\r\n`,
    end: () => '',
  }
}
