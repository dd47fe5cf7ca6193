/**
 * Paging by keys: a total order over the catalogue's rows (missing values last, the galaxy's number deciding ties) and the condition that
 * begins after a given row. The cost of a page does not grow with its place.
 */
import type { Knex } from 'knex'
import { columnOf } from '../../core/columns.ts'
import type { SortKey } from '../../core/filters/filter.ts'
import { readTime } from '../../core/filters/ranges.ts'
import { BadInput } from '../http/errors.ts'
import type { Fragment } from './at-revision.ts'
import { identifier } from './filter-sql.ts'

/** Columns of which every row has a value (NOT NULL in the database; held by a test). */
export const NEVER_MISSING: ReadonlySet<string> = new Set([
  'slug', 'name', 'status', 'class', 'ra', 'dec', 'glon', 'glat', 'sgl', 'sgb', 'n_distance', 'n_distance_all', 'host_relation', 'n_measurements', 'n_sources',
  'revision', 'updated_at',
])

/** Of the database's integer columns. */
const LARGEST_INTEGER = 2_147_483_647

type KeyValue = string | number | null

/** The row after which a page begins: the value of every sort column, then the galaxy's number. */
export interface Cursor {
  values: readonly KeyValue[]
  galaxy: number
}

/** Names a sort within a cursor, so that a cursor of another order is noticed. */
function signature(sort: readonly SortKey[]): string {
  return sort.map((key) => `${key.descending ? '-' : ''}${key.column}`).join(',')
}

/** @param keys - `[value, ..., galaxy]` of the last row, as the page query gives them */
export function printCursor(sort: readonly SortKey[], keys: readonly KeyValue[]): string {
  return Buffer.from(JSON.stringify([signature(sort), ...keys])).toString('base64url')
}

/** @throws BadInput for a cursor that is not ours, or belongs to another sort */
export function readCursor(sort: readonly SortKey[], text: string): Cursor {
  const wrong = (message: string): BadInput => new BadInput(`${message} Nothing is lost: ask for the first page again.`, [{ path: 'cursor', message }])
  let parts: unknown
  try {
    parts = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'))
  } catch {
    throw wrong('This is no cursor of ours: give "next" of the page before, unchanged.')
  }
  if (!Array.isArray(parts) || parts.length !== sort.length + 2 || parts[0] !== signature(sort)) {
    throw wrong('This cursor belongs to a list in another order.')
  }
  const galaxy: unknown = parts.at(-1)
  const values: unknown[] = parts.slice(1, -1)
  const fits = sort.every((key, i) => fitsColumn(key.column, values[i]))
  if (!Number.isInteger(galaxy) || Math.abs(galaxy as number) > LARGEST_INTEGER || !fits) throw wrong('This is no cursor of ours: give "next" of the page before, unchanged.')
  return { values: values as KeyValue[], galaxy: galaxy as number }
}

function fitsColumn(key: string, value: unknown): boolean {
  if (value === null) return !NEVER_MISSING.has(key)
  const type = columnOf(key)?.type
  if (type === 'real') return Number.isFinite(value)
  if (type === 'integer') return Number.isInteger(value) && Math.abs(value as number) <= LARGEST_INTEGER
  if (typeof value !== 'string' || value.length > 400 || value.includes('\0')) return false
  return type !== 'time' || (/^.{19}(\.\d{1,6})?\+00:00$/.test(value) && readTime(`${value.slice(0, 19)}Z`) !== null)
}

function direction(descending: boolean): string {
  return descending ? 'DESC' : 'ASC'
}

/** Ties are decided in the direction of the first key, so that one index serves both ways. */
function galaxyDescends(sort: readonly SortKey[]): boolean {
  return sort[0]?.descending ?? false
}

/**
 * ORDER BY of the sort over rows under an alias. With `firstUniform` the first column has values in all rows or in none, which
 * lets an index give the order backwards too (its missing values stand at the other end there).
 */
export function orderBy(sort: readonly SortKey[], firstUniform: boolean): string {
  const keys = sort.map((key, i) => {
    const plain = NEVER_MISSING.has(key.column) || (i === 0 && firstUniform)
    return `${identifier(key.column)} ${direction(key.descending)}${plain ? '' : ' NULLS LAST'}`
  })
  return [...keys, `galaxy ${direction(galaxyDescends(sort))}`].join(', ')
}

/** Rows after the cursor in this order. */
export function after(sort: readonly SortKey[], cursor: Cursor): Fragment {
  const galaxy: Fragment = { sql: `galaxy ${galaxyDescends(sort) ? '<' : '>'} ?`, bindings: [cursor.galaxy] }
  return sort.reduceRight<Fragment>((rest, key, i) => afterKey(key, cursor.values[i] ?? null, rest), galaxy)
}

function afterKey(key: SortKey, value: KeyValue, rest: Fragment): Fragment {
  const column = identifier(key.column)
  // Missing values are last: after one of them come only others with a later rest.
  if (value === null) return { sql: `${column} IS NULL AND (${rest.sql})`, bindings: rest.bindings }
  const bound = `?::${sqlType(key.column)}`
  const [beyond, notBefore] = key.descending ? ['<', '<='] : ['>', '>=']
  const binding: Knex.RawBinding = value
  const later = `${column} ${beyond} ${bound} OR (${column} = ${bound} AND (${rest.sql}))`
  const bindings = [binding, binding, ...rest.bindings]
  if (!NEVER_MISSING.has(key.column)) return { sql: `${later} OR ${column} IS NULL`, bindings }
  // Says the same again, in a form by which an index can begin at the right place.
  return { sql: `${column} ${notBefore} ${bound} AND (${later})`, bindings: [binding, ...bindings] }
}

function sqlType(key: string): string {
  const type = columnOf(key)?.type
  return type === 'real' ? 'float8' : type === 'integer' ? 'integer' : type === 'time' ? 'timestamptz' : 'text'
}
