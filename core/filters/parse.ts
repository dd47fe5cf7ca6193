/** From query parameters to a filter. Everything that cannot be understood is named, with the reason, and nothing is guessed. */
import { COLUMNS, columnOf, type Column } from '../columns.ts'
import { nameKey } from '../names.ts'
import { EMPTY_FILTER, FILTER_PARAMETERS, LONGEST_VALUE, MOST_ROWS_A_PAGE, type Condition, type Filter, type SortKey } from './filter.ts'
import { nearestName } from './nearest.ts'
import { bad, readNumber, readNumberRanges, readTimeRanges, splitList, type Reading } from './ranges.ts'

export interface FilterError {
  /** The parameter. */
  path: string
  /** A sentence. */
  message: string
}

type Parameter = (typeof FILTER_PARAMETERS)[number]

const COLUMN_KEYS = COLUMNS.map((c) => c.key)
const KNOWN = [...COLUMN_KEYS, ...FILTER_PARAMETERS]
const SLUG = /^[a-z0-9]+(-[a-z0-9]+)*$/
const MOST_SORT_KEYS = 8
const MOST_ERRORS = 20
const LARGEST_RADIUS_KPC = 1e6

/**
 * Reads query parameters. What could be read stands in the filter even when there are errors.
 *
 * @returns `errors` empty when everything was understood
 */
export function parseFilter(parameters: URLSearchParams): { filter: Filter; errors: FilterError[] } {
  const errors: FilterError[] = []
  const conditions: Record<string, Condition> = {}
  const rest: Partial<Filter> = {}
  const keep = <Value>(path: string, reading: Reading<Value>, store: (value: Value) => void): void => {
    if (reading.ok) store(reading.value)
    else errors.push({ path, message: reading.error })
  }
  for (const key of new Set(parameters.keys())) {
    const values = parameters.getAll(key)
    const text = values[0] ?? ''
    const column = columnOf(key)
    if (values.length > 1) errors.push({ path: shortened(key), message: repeated(key, values.length, column) })
    else if (column) keep(key, readCondition(text, column), (condition) => { conditions[key] = condition })
    else if (isParameter(key)) keep(key, PARAMETERS[key](text), (part) => { Object.assign(rest, part) })
    else errors.push({ path: shortened(key), message: unknownColumn(key, KNOWN) })
    if (errors.length >= MOST_ERRORS) break
  }
  const filter: Filter = { ...EMPTY_FILTER, ...rest, conditions }
  const both = filter.has.find((key) => filter.lacks.includes(key))
  if (both !== undefined) errors.push({ path: 'lacks', message: `"has" and "lacks" both name ${both}, so nothing could match.` })
  return { filter, errors }
}

function isParameter(key: string): key is Parameter {
  return (FILTER_PARAMETERS as readonly string[]).includes(key)
}

function shortened(text: string): string {
  return text.length > 60 ? `${text.slice(0, 60)}…` : text
}

function repeated(key: string, times: number, column: Column | undefined): string {
  const hint = column ? ` Write alternatives in one list: ${key}=a,b.` : ' Give it once.'
  return `"${shortened(key)}" stands ${times} times.${hint}`
}

function unknownColumn(key: string, known: readonly string[]): string {
  const near = nearestName(key, known)
  return `There is no column "${shortened(key)}".${near === undefined ? ' The columns are listed at /api/docs.' : ` Did you mean ${near}?`}`
}

function readCondition(text: string, column: Column): Reading<Condition> {
  const exclude = text.trimStart().startsWith('!')
  const body = exclude ? text.trimStart().slice(1) : text
  if (body.trim() === '') return bad(`Nothing stands after "${column.key}=${exclude ? '!' : ''}". Leave it out to ask for any, or write lacks=${column.key} for no value.`)
  const list = splitList(body)
  if (!list.ok) return list
  if (column.type === 'real' || column.type === 'integer') {
    const ranges = readNumberRanges(list.value)
    if (!ranges.ok) return throughZero(column, list.value) ?? ranges
    return { ok: true, value: { kind: 'numbers', ranges: ranges.value, exclude } }
  }
  if (column.type === 'time') {
    const ranges = readTimeRanges(list.value)
    return ranges.ok ? { ok: true, value: { kind: 'times', ranges: ranges.value, exclude } } : ranges
  }
  const wrong = column.type === 'choice' ? list.value.map((value) => wrongChoice(value, column)).find((w) => w !== undefined) : undefined
  return wrong ?? { ok: true, value: { kind: 'list', values: list.value, exclude } }
}

/** An angle that goes round is often meant by a reversed range: say how that is written. */
function throughZero(column: Column, texts: readonly string[]): { ok: false; error: string } | undefined {
  const [lo, hi] = (texts.length === 1 ? (texts[0] ?? '') : '').split('..').map((end) => readNumber(end))
  if (column.unit !== 'deg' || lo == null || hi == null || lo <= hi || hi < 0) return undefined
  return bad(`The range runs from ${lo} down to ${hi}. For a range through 0 write ${column.key}=${lo}..360,0..${hi}, else the smaller end first.`)
}

function wrongChoice(value: string, column: Column): { ok: false; error: string } | undefined {
  if (!column.choices) return SLUG.test(value) ? undefined : bad(`"${shortened(value)}" is no identifier of a galaxy: those are lower-case letters, digits and hyphens.`)
  if (column.choices.includes(value)) return undefined
  const near = nearestName(value, column.choices)
  const hint = near === undefined ? `It is one of ${column.choices.join(', ')}.` : `Did you mean ${near}?`
  return bad(`${column.key} is never "${shortened(value)}". ${hint}`)
}

const PARAMETERS: Readonly<Record<Parameter, (text: string) => Reading<Partial<Filter>>>> = {
  has: (text) => mapped(readColumns(text), (has) => ({ has })),
  lacks: (text) => mapped(readColumns(text), (lacks) => ({ lacks })),
  columns: (text) => mapped(readColumns(text), (columns) => ({ columns })),
  q: (text) => mapped(readWords(text), (q) => ({ q })),
  cone: (text) => mapped(readCone(text), (cone) => ({ cone })),
  within: (text) => mapped(readWithin(text), (within) => ({ within })),
  sort: (text) => mapped(readSort(text), (sort) => ({ sort })),
  limit: (text) => mapped(readLimit(text), (limit) => ({ limit })),
  cursor: (text) => mapped(readCursor(text), (cursor) => ({ cursor })),
  at: (text) => mapped(readAt(text), (at) => ({ at })),
}

function mapped<From, To>(reading: Reading<From>, change: (value: From) => To): Reading<To> {
  return reading.ok ? { ok: true, value: change(reading.value) } : reading
}

function readColumns(text: string): Reading<string[]> {
  const list = splitList(text)
  if (!list.ok) return list
  const wrong = list.value.find((key) => !columnOf(key))
  return wrong === undefined ? list : bad(unknownColumn(wrong, COLUMN_KEYS))
}

function readWords(text: string): Reading<string | null> {
  const words = text.trim().replace(/\s+/g, ' ')
  if (words === '') return { ok: true, value: null }
  if (words.length > LONGEST_VALUE) return bad(`The search has more than ${LONGEST_VALUE} characters.`)
  return nameKey(words) === '' ? bad('The search holds no letter and no digit.') : { ok: true, value: words }
}

function readCone(text: string): Reading<NonNullable<Filter['cone']>> {
  const parts = text.split(',')
  const [ra, dec, radius] = parts.map((part) => readNumber(part))
  if (parts.length !== 3 || ra == null || dec == null || radius == null) return bad('A cone is three numbers in degrees, ICRS: cone=ra,dec,radius, such as cone=10.68,41.27,2.')
  if (ra < 0 || ra > 360) return bad(`Right ascension runs from 0 to 360 degrees, not ${ra}.`)
  if (dec < -90 || dec > 90) return bad(`Declination runs from −90 to +90 degrees, not ${dec}.`)
  if (radius <= 0 || radius > 180) return bad(`The radius of a cone is above 0 and at most 180 degrees, not ${radius}.`)
  return { ok: true, value: { ra: ra === 360 ? 0 : ra, dec, radius } }
}

function readWithin(text: string): Reading<NonNullable<Filter['within']>> {
  const parts = text.split(',').map((part) => part.trim())
  const [host = '', radiusText = ''] = parts
  const radius = readNumber(radiusText)
  if (parts.length !== 2 || !SLUG.test(host) || radius === null) return bad('A sphere is a galaxy and a radius in kpc: within=identifier,radius, such as within=ostrel,300.')
  if (host.length > LONGEST_VALUE) return bad('That is too long for the identifier of a galaxy.')
  if (radius <= 0 || radius > LARGEST_RADIUS_KPC) return bad(`The radius is above 0 and at most ${LARGEST_RADIUS_KPC} kpc, not ${radius}.`)
  return { ok: true, value: { host, radius } }
}

function readSort(text: string): Reading<SortKey[]> {
  const list = splitList(text)
  if (!list.ok) return list
  const sort = list.value.map((entry) => ({ column: entry.replace(/^[-\u2212]/, ''), descending: /^[-\u2212]/.test(entry) }))
  const wrong = sort.find((key) => !columnOf(key.column))
  if (wrong) return bad(unknownColumn(wrong.column, COLUMN_KEYS))
  const twice = sort.find((key, i) => sort.findIndex((other) => other.column === key.column) !== i)
  if (twice) return bad(`${twice.column} stands twice in the sort.`)
  return sort.length > MOST_SORT_KEYS ? bad(`The sort names ${sort.length} columns; at most ${MOST_SORT_KEYS} are possible.`) : { ok: true, value: sort }
}

function readLimit(text: string): Reading<number> {
  const limit = /^\d{1,9}$/.test(text.trim()) ? Number(text) : NaN
  if (limit >= 1 && limit <= MOST_ROWS_A_PAGE) return { ok: true, value: limit }
  return bad(`A page has 1 to ${MOST_ROWS_A_PAGE} rows, not "${shortened(text)}". For more follow "next", or take an export.`)
}

function readCursor(text: string): Reading<string> {
  return /^[A-Za-z0-9_-]{1,4000}$/.test(text) ? { ok: true, value: text } : bad('This is no cursor of ours: give "next" of the page before, unchanged.')
}

function readAt(text: string): Reading<string> {
  return /^[0-9A-Za-z][0-9A-Za-z.-]{0,39}$/.test(text) ? { ok: true, value: text } : bad('Give a revision number or the label of a release.')
}
