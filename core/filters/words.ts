/** The parts of a filter in words. */
import { classLabel, type GalaxyClass } from '../classes.ts'
import { COLUMNS, columnOf, type Column } from '../columns.ts'
import { labelInSentence, numberWords } from '../formats/measure-words.ts'
import { METHODS } from '../methods.ts'
import { GAP } from '../spaces.ts'
import type { Condition, Filter, Range } from './filter.ts'

/** Names of galaxies by their slugs, for hosts and centres; a slug without one is shown as it is. */
export type FilterLabels = Readonly<Record<string, string>>

const MAGNITUDES = COLUMNS.filter((c) => /^(phot\.mag|phys\.magAbs);em/.test(c.ucd) || c.key === 'mu_half').map((c) => c.key)
const PROPER = /^(Galactic|Local|CMB)\b/

/** A column in the middle of a sentence: "distance", "M_V", "Galactic latitude". */
export function columnWords(column: Column): string {
  if (column.key.startsWith('abs_')) return column.head
  if (column.label.endsWith(', log')) return `log ${labelInSentence(column.label.slice(0, -', log'.length))}`
  return PROPER.test(column.label) ? column.label : labelInSentence(column.label)
}

/** One value of a text or choice column in words. */
export function valueWords(column: string, value: string, labels: FilterLabels): string {
  if (column === 'class') return classLabel(value as GalaxyClass)
  if (column === 'distance_method') return METHODS.find((m) => m.key === value)?.label ?? value
  if (column === 'host_relation' && value === 'field') return 'in the field'
  return column === 'host' || column === 'main_disturber' ? (labels[value] ?? value) : value
}

export function inList(words: readonly string[], last: 'or' | 'and'): string {
  if (words.length <= 1) return words[0] ?? ''
  return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1) ?? ''}`
}

const UNIT_WORDS: Readonly<Record<string, string>> = { deg: '°', mag: '', 'mag/arcsec**2': `${GAP}mag/arcsec²`, 'Jy.km/s': `${GAP}Jy${GAP}km/s` }

function withUnit(text: string, { unit }: Column): string {
  return text + (UNIT_WORDS[unit] ?? (unit === '' ? '' : GAP + unit))
}

/** A range of numbers in words: "2 to 5 Mpc", "brighter than −10", "at least 3". */
export function rangeWords({ lo, hi }: Range<number>, column: Column): string {
  const print = (n: number): string => numberWords(n, 0)
  const magnitude = MAGNITUDES.includes(column.key)
  if (lo !== null && lo === hi) return withUnit(print(lo), column)
  if (lo !== null && hi !== null) return withUnit(`${print(lo)} to ${print(hi)}`, column)
  if (hi !== null) return `${magnitude ? 'brighter than' : 'at most'} ${withUnit(print(hi), column)}`
  return `${magnitude ? 'fainter than' : 'at least'} ${withUnit(print(lo ?? 0), column)}`
}

function timeWords({ lo, hi }: Range<string>): string {
  const print = (time: string): string => (time.length === 10 ? time : time.replace('T', ' ').replace('Z', ' UTC'))
  if (lo !== null && lo === hi) return print(lo)
  if (lo !== null && hi !== null) return `${print(lo)} to ${print(hi)}`
  return hi !== null ? `until ${print(hi)}` : `since ${print(lo ?? '')}`
}

/** A condition with its column: "distance 2 to 5 Mpc", "class not spiral or lenticular", "Galactic latitude not −10 to 10°". */
export function conditionWords(key: string, condition: Condition, labels: FilterLabels): string {
  const column = columnOf(key)
  if (!column) return key
  const alternatives =
    condition.kind === 'list' ? condition.values.map((value) => valueWords(key, value, labels))
    : condition.kind === 'numbers' ? condition.ranges.map((range) => rangeWords(range, column))
    : condition.ranges.map((range) => timeWords(range))
  return `${columnWords(column)} ${condition.exclude ? 'not ' : ''}${inList(alternatives, 'or')}`
}

export function coneWords({ ra, dec, radius }: NonNullable<Filter['cone']>): string {
  return `within ${numberWords(radius, 0)}° of RA ${numberWords(ra, 0)}°, Dec ${dec >= 0 ? '+' : ''}${numberWords(dec, 0)}°`
}

export function withinWords({ host, radius }: NonNullable<Filter['within']>, labels: FilterLabels): string {
  return `within ${numberWords(radius, 0)}${GAP}kpc of ${labels[host] ?? host}`
}

export function presenceWords(key: string, present: boolean): string {
  const column = columnOf(key)
  return `${present ? 'with' : 'without'} ${column ? columnWords(column) : key}`
}
