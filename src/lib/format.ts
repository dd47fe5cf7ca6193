/** How numbers, errors and dates are written for people. Nothing here is read back by a program. */

import { GAP } from '../../core/spaces.ts'

/** U+2212, the true minus. */
export const MINUS = '\u2212'
/** What stands for a missing value. */
export const MISSING = '—'

/** A number with a fixed count of decimals and a true minus; never "−0.00". A missing or non-finite one is an em dash. */
export function formatNumber(value: number | null | undefined, decimals = 2): string {
  if (value == null || !Number.isFinite(value)) return MISSING
  const text = Math.abs(value).toFixed(decimals)
  return value < 0 && Number(text) !== 0 ? MINUS + text : text
}

/** As `formatNumber`, with + before what is not negative: for differences. */
export function formatSigned(value: number | null | undefined, decimals = 2): string {
  const text = formatNumber(value, decimals)
  return text === MISSING || text.startsWith(MINUS) ? text : `+${text}`
}

/** A count, thousands parted by thin spaces from five digits on: 1500, 12 345. */
export function formatCount(value: number): string {
  const digits = Math.abs(Math.round(value)).toString()
  const grouped = digits.length > 4 ? digits.replace(/\B(?=(\d{3})+$)/g, GAP) : digits
  return value < 0 ? MINUS + grouped : grouped
}

/** "1 galaxy", "12 galaxies". */
export function formatCounted(value: number, one: string, many = `${one}s`): string {
  return `${formatCount(value)} ${value === 1 ? one : many}`
}

/** A fraction 0..1 as a percentage: 0.31 is "31 %". */
export function formatPercent(fraction: number | null | undefined, decimals = 0): string {
  return fraction == null || !Number.isFinite(fraction) ? MISSING : `${formatNumber(fraction * 100, decimals)}${GAP}%`
}

export interface MeasureParts {
  value: number | null | undefined
  /** Error upwards, not negative, same unit as the value. */
  plus?: number | null
  /** Error downwards, not negative. */
  minus?: number | null
  unit?: string
  decimals?: number
}

/** One line of plain text: `3.61 +0.09 −0.08 Mpc`, `27.77 ± 0.05 mag`, or an em dash. */
export function formatMeasure({ value, plus, minus, unit, decimals = 2 }: MeasureParts): string {
  if (value == null || !Number.isFinite(value)) return MISSING
  const up = plus ?? minus
  const down = minus ?? plus
  const parts = [formatNumber(value, decimals)]
  if (up != null && down != null) {
    const above = formatNumber(up, decimals)
    const below = formatNumber(down, decimals)
    parts.push(above === below ? `±${GAP}${above}` : `+${above}${GAP}${MINUS}${below}`)
  }
  if (unit) parts.push(unit)
  return parts.join(GAP)
}

const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' })
const DAY_TIME = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' })
const CLOCK = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' })

function readDate(moment: string | Date | null | undefined): Date | null {
  if (moment == null) return null
  const date = moment instanceof Date ? moment : new Date(moment)
  return Number.isNaN(date.getTime()) ? null : date
}

/** "18 Nov 2026", in the reader's time zone. */
export function formatDay(moment: string | Date | null | undefined): string {
  const date = readDate(moment)
  return date ? DAY.format(date) : MISSING
}

/** "18 Nov 2026, 14:02", in the reader's time zone. */
export function formatDayTime(moment: string | Date | null | undefined): string {
  const date = readDate(moment)
  return date ? DAY_TIME.format(date) : MISSING
}

/** "14:02": for "saved 14:02". */
export function formatClock(moment: string | Date | null | undefined): string {
  const date = readDate(moment)
  return date ? CLOCK.format(date) : MISSING
}

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
const DAY_MS = 24 * HOUR_MS

/** How long ago, coarsely: "just now", "12 min", "5 h", "3 d", then the day itself. */
export function formatAge(moment: string | Date | null | undefined, now: Date = new Date()): string {
  const date = readDate(moment)
  if (!date) return MISSING
  const age = now.getTime() - date.getTime()
  if (age < MINUTE_MS) return 'just now'
  if (age < HOUR_MS) return `${Math.floor(age / MINUTE_MS)}${GAP}min`
  if (age < DAY_MS) return `${Math.floor(age / HOUR_MS)}${GAP}h`
  if (age < 14 * DAY_MS) return `${Math.floor(age / DAY_MS)}${GAP}d`
  return DAY.format(date)
}

/** A file's size: "812 B", "1.4 MB" (powers of ten). */
export function formatBytes(bytes: number): string {
  const units = ['B', 'kB', 'MB', 'GB']
  let size = bytes
  let step = 0
  while (size >= 1000 && step < units.length - 1) {
    size /= 1000
    step += 1
  }
  return `${size.toFixed(step === 0 || size >= 100 ? 0 : 1)}${GAP}${units[step] ?? 'B'}`
}

const UNIT_WORDS: Record<string, string> = {
  'km/s': `km${GAP}s⁻¹`,
  deg: '°',
  arcmin: 'arcmin',
  'mag/arcsec2': `mag${GAP}arcsec⁻²`,
  'Jy km/s': `Jy${GAP}km${GAP}s⁻¹`,
  'log(solMass)': 'log M☉',
}

/** A VOUnit as people read it: `km/s` is "km s⁻¹". Unknown ones stay as they are. */
export function unitText(unit: string): string {
  return UNIT_WORDS[unit] ?? unit
}
