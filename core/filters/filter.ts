/**
 * A filter of the catalogue: what the table, the map, the export and a link all hold, written as plain query parameters, one a column.
 *
 * `host=ostrel&class=dwarf-spheroidal,dwarf-irregular&distance=2..5&abs_v=..-10&tidal_index=0..&has=v_hel&sort=-abs_v,name`
 */
import { COLUMNS, columnOf, type Column } from '../columns.ts'

/** From `lo` to `hi`, both included; null for an open end, never both. */
export interface Range<Bound> {
  lo: Bound | null
  hi: Bound | null
}

/**
 * What one column must be. With `exclude` the matching rows are left out instead, and rows without a value stay.
 *
 * Bounds of a time are days (`2026-03-01`) or instants of UTC (`2026-03-01T12:00:00Z`); a day as upper bound counts to its end.
 */
export type Condition =
  | { kind: 'list'; values: readonly string[]; exclude: boolean }
  | { kind: 'numbers'; ranges: readonly Range<number>[]; exclude: boolean }
  | { kind: 'times'; ranges: readonly Range<string>[]; exclude: boolean }

export interface SortKey {
  column: string
  descending: boolean
}

export interface Filter {
  /** By column key; in any order. */
  conditions: Readonly<Record<string, Condition>>
  /** Columns that must have, or lack, a value. */
  has: readonly string[]
  lacks: readonly string[]
  /** Words searched for in every name; null for none. */
  q: string | null
  /** A circle on the sky, ICRS, all in deg. */
  cone: { ra: number; dec: number; radius: number } | null
  /** A sphere about a galaxy, which is in it; radius in kpc. */
  within: { host: string; radius: number } | null
  /** Columns wanted, in this order; null for all. */
  columns: readonly string[] | null
  /** Empty for the usual order, by name. */
  sort: readonly SortKey[]
  /** Rows a page; null for the usual number. */
  limit: number | null
  /** Where the page begins, as an answer gave it. */
  cursor: string | null
  /** A revision number or the label of a release. */
  at: string | null
}

export const EMPTY_FILTER: Filter = {
  conditions: {}, has: [], lacks: [], q: null, cone: null, within: null, columns: null, sort: [], limit: null, cursor: null, at: null,
}

/** Parameters that are no columns. */
export const FILTER_PARAMETERS = ['has', 'lacks', 'q', 'cone', 'within', 'columns', 'sort', 'limit', 'cursor', 'at'] as const

export const USUAL_SORT: readonly SortKey[] = [{ column: 'name', descending: false }]
export const USUAL_LIMIT = 100
export const MOST_ROWS_A_PAGE = 500
/** Most entries of a list, in characters of one entry, and of the words searched for. */
export const MOST_VALUES = 200
export const LONGEST_VALUE = 200

/** The sort that holds. */
export function sortOf(filter: Filter): readonly SortKey[] {
  return filter.sort.length > 0 ? filter.sort : USUAL_SORT
}

/** The columns that are wanted, as the registry has them. */
export function columnsOf(filter: Filter): readonly Column[] {
  if (!filter.columns) return COLUMNS
  return filter.columns.map((key) => columnOf(key)).filter((c) => c !== undefined)
}

/** The filter with one condition set, or (null) taken away; it begins again at the first page. */
export function withCondition(filter: Filter, column: string, condition: Condition | null): Filter {
  const { [column]: _old, ...others } = filter.conditions
  return { ...filter, cursor: null, conditions: condition ? { ...others, [column]: condition } : others }
}

/** The values that a choice column is held to; empty when there is no such list, or when it excludes. */
export function chosenValues(filter: Filter, column: string): readonly string[] {
  const condition = filter.conditions[column]
  return condition?.kind === 'list' && !condition.exclude ? condition.values : []
}

/** The one range that a number column is held to; null when there is none, or more than a slider can show. */
export function chosenRange(filter: Filter, column: string): Range<number> | null {
  const condition = filter.conditions[column]
  if (condition?.kind !== 'numbers' || condition.exclude || condition.ranges.length !== 1) return null
  return condition.ranges[0] ?? null
}

/** The filter held to these values of a choice column; to any, when the list is empty. */
export function choosing(filter: Filter, column: string, values: readonly string[]): Filter {
  return withCondition(filter, column, values.length === 0 ? null : { kind: 'list', values: [...values], exclude: false })
}

/** The filter held to this range of a number column; to any, when both ends are open. */
export function ranging(filter: Filter, column: string, range: Range<number>): Filter {
  const open = range.lo === null && range.hi === null
  return withCondition(filter, column, open ? null : { kind: 'numbers', ranges: [range], exclude: false })
}
