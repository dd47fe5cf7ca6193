/** Ranges and lists as query parameters write them: `2..5`, `..-10`, `0..`, `3`, `350..360,0..10`, `!-10..10`. */
import { LONGEST_VALUE, MOST_VALUES, type Range } from './filter.ts'

export type Reading<Value> = { ok: true; value: Value } | { ok: false; error: string }

export const bad = (error: string): { ok: false; error: string } => ({ ok: false, error })

const NUMBER = /^[+-]?(\d+(\.\d+)?|\.\d+)(e[+-]?\d{1,3})?$/i
const DAY = /^(\d{4})-(\d{2})-(\d{2})$/
const INSTANT = /^(\d{4}-\d{2}-\d{2})T([01]\d|2[0-3]):([0-5]\d)(?::([0-5]\d))?Z$/

/** A decimal number; a true minus counts as a minus, an infinity is none. */
export function readNumber(text: string): number | null {
  const plain = text.trim().replace(/^\u2212/, '-')
  if (!NUMBER.test(plain)) return null
  const value = Number(plain)
  return Number.isFinite(value) ? value + 0 : null
}

/** A day or an instant of UTC, as it is kept: `2026-03-01` or `2026-03-01T12:00:00Z`. */
export function readTime(text: string): string | null {
  const plain = text.trim()
  if (isDay(plain)) return plain
  const instant = INSTANT.exec(plain)
  if (!instant || !isDay(instant[1] ?? '')) return null
  return `${instant[1]}T${instant[2]}:${instant[3]}:${instant[4] ?? '00'}Z`
}

function isDay(text: string): boolean {
  const day = DAY.exec(text)
  if (!day) return false
  const [year, month, date] = [Number(day[1]), Number(day[2]), Number(day[3])]
  if (year < 1 || month < 1 || month > 12 || date < 1) return false
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0
  const days = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1] ?? 0
  return date <= days
}

/** The first instant of a bound, for telling which comes first. */
function startOf(time: string): string {
  return time.length === 10 ? `${time}T00:00:00Z` : time
}

/** Whether a lower bound lies after an upper one; a day as upper bound counts to its end. */
function timesReversed(lo: string, hi: string): boolean {
  return hi.length === 10 ? startOf(lo).slice(0, 10) > hi : startOf(lo) > hi
}

export function readNumberRanges(texts: readonly string[]): Reading<Range<number>[]> {
  return readRanges(texts, {
    read: readNumber,
    reversed: (lo, hi) => lo > hi,
    what: 'a number',
    forms: '2..5, 2.. or ..5 (both ends count)',
  })
}

export function readTimeRanges(texts: readonly string[]): Reading<Range<string>[]> {
  return readRanges(texts, {
    read: readTime,
    reversed: timesReversed,
    what: 'a day (2026-03-01) or an instant (2026-03-01T12:00:00Z)',
    forms: '2026-01-01..2026-03-31, 2026-01-01.. or ..2026-03-31 (both ends count)',
  })
}

interface RangeKind<Bound> {
  read: (text: string) => Bound | null
  reversed: (lo: Bound, hi: Bound) => boolean
  what: string
  forms: string
}

function readRanges<Bound>(texts: readonly string[], kind: RangeKind<Bound>): Reading<Range<Bound>[]> {
  const ranges: Range<Bound>[] = []
  for (const text of texts) {
    const reading = readRange(text, kind)
    if (!reading.ok) return reading
    ranges.push(reading.value)
  }
  return { ok: true, value: ranges }
}

function readRange<Bound>(text: string, { read, reversed, what, forms }: RangeKind<Bound>): Reading<Range<Bound>> {
  const gap = text.indexOf('..')
  if (gap < 0) {
    const only = read(text)
    return only === null ? bad(`"${text}" is not ${what}. Write a range as ${forms}.`) : { ok: true, value: { lo: only, hi: only } }
  }
  const [left, right] = [text.slice(0, gap).trim(), text.slice(gap + 2).trim()]
  if (left === '' && right === '') return bad('".." has no end at all: it would let everything through. Give one end, or leave it out.')
  const lo = left === '' ? null : read(left)
  const hi = right === '' ? null : read(right)
  if (left !== '' && lo === null) return bad(`"${left}" is not ${what}. Write a range as ${forms}.`)
  if (right !== '' && hi === null) return bad(`"${right}" is not ${what}. Write a range as ${forms}.`)
  if (lo !== null && hi !== null && reversed(lo, hi)) return bad(`The range runs from ${left} down to ${right}. Write the smaller end first: ${right}..${left}.`)
  return { ok: true, value: { lo, hi } }
}

/** Splits a list at its commas; `\,` is a comma inside an entry, `\\` a backslash. */
export function splitList(text: string): Reading<string[]> {
  const entries: string[] = []
  let entry = ''
  for (let i = 0; i < text.length; i++) {
    const letter = text.charAt(i)
    if (letter === '\\' && i + 1 < text.length) entry += text.charAt(++i)
    else if (letter === ',') {
      entries.push(entry.trim())
      entry = ''
    } else entry += letter
  }
  entries.push(entry.trim())
  if (entries.some((e) => e === '')) return bad('An entry of the list is empty. Separate the entries by single commas.')
  if (entries.length > MOST_VALUES) return bad(`The list has ${entries.length} entries; at most ${MOST_VALUES} are possible.`)
  if (entries.some((e) => e.length > LONGEST_VALUE)) return bad(`An entry of the list is longer than ${LONGEST_VALUE} characters.`)
  return { ok: true, value: [...new Set(entries)] }
}

/** Joins a list so that `splitList` gives it back. */
export function joinList(entries: readonly string[]): string {
  return entries.map((e) => e.replace(/[\\,]/g, '\\$&').replace(/^!/, '\\!')).join(',')
}

export function printRange<Bound extends string | number>({ lo, hi }: Range<Bound>): string {
  if (lo !== null && lo === hi) return String(lo)
  return `${lo ?? ''}..${hi ?? ''}`
}
