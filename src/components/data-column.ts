import type { ReactNode } from 'react'
import { formatNumber, unitText } from '../lib/format.ts'

export interface DataColumn<Row> {
  key: string
  header: string
  /** VOUnit or as printed; shown small below the header. */
  unit?: string
  /** A sentence on the column, shown on hover of its head. */
  help?: string
  /** Numbers stand at the end, texts at the start; by default as `decimals` says. */
  align?: 'start' | 'end'
  /** In px; used when rows are virtual, and as the least width otherwise. */
  width?: number
  /** The plain value: sorts, is copied, and is the cell's text when there is no `render`. Null where it is missing. */
  text: (row: Row) => string | number | null
  /** Decimals of a numeric `text` in the cell; copies keep the full value. */
  decimals?: number
  render?: (row: Row) => ReactNode
  sortable?: boolean
}

export interface SortState {
  key: string
  direction: 'ascending' | 'descending'
}

export function isNumeric<Row>(column: DataColumn<Row>): boolean {
  return column.align ? column.align === 'end' : column.decimals !== undefined
}

/** The cell's words for people; null where the value is missing. */
export function cellText<Row>(column: DataColumn<Row>, row: Row): string | null {
  const value = column.text(row)
  if (value === null || value === '') return null
  return typeof value === 'number' ? formatNumber(value, column.decimals ?? 0) : value
}

const COLLATOR = new Intl.Collator('en', { numeric: true, sensitivity: 'base' })

/** Sorted copy; equal rows keep their order, and missing values come last whichever the direction. */
export function sortRows<Row>(rows: readonly Row[], column: DataColumn<Row>, direction: SortState['direction']): Row[] {
  const sign = direction === 'ascending' ? 1 : -1
  const missing = (value: string | number | null): boolean => value === null || value === '' || (typeof value === 'number' && Number.isNaN(value))
  return rows
    .map((row) => ({ row, value: column.text(row) }))
    .sort((a, b) => {
      if (missing(a.value) || missing(b.value)) return Number(missing(a.value)) - Number(missing(b.value))
      if (typeof a.value === 'number' && typeof b.value === 'number') return sign * (a.value - b.value)
      return sign * COLLATOR.compare(String(a.value), String(b.value))
    })
    .map((entry) => entry.row)
}

const oneLine = (text: string): string => text.replace(/[\t\r\n]+/g, ' ')

/** Tab-separated text with a head line, for spreadsheets: full values, empty where missing. */
export function rowsToTsv<Row>(columns: readonly DataColumn<Row>[], rows: readonly Row[]): string {
  const head = columns.map((column) => oneLine(column.unit ? `${column.header} (${unitText(column.unit)})` : column.header)).join('\t')
  const body = rows.map((row) =>
    columns
      .map((column) => {
        const value = column.text(row)
        return value === null ? '' : oneLine(String(value))
      })
      .join('\t'),
  )
  return [head, ...body].join('\n')
}
