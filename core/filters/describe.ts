/** A filter as a sentence. */
import { COLUMNS, columnOf } from '../columns.ts'
import type { Condition, Filter } from './filter.ts'
import { columnWords, conditionWords, coneWords, inList, presenceWords, rangeWords, valueWords, withinWords, type FilterLabels } from './words.ts'

/**
 * What a filter lets through, for captions, exports and saved views; order, page and columns are not told.
 *
 * @param labels - names of the galaxies that it names by their slugs
 * @example "Satellites of Ostrel or Mirrow, distance 2 to 5 Mpc, M_V brighter than −10"
 */
export function describeFilter(filter: Filter, labels: FilterLabels = {}): string {
  const subject = subjectOf(filter, labels)
  const parts = COLUMNS.filter(({ key }) => !subject.told.includes(key)).flatMap(({ key }) => {
    const condition = filter.conditions[key]
    return condition ? [conditionWords(key, condition, labels)] : []
  })
  parts.push(...filter.has.map((key) => presenceWords(key, true)), ...filter.lacks.map((key) => presenceWords(key, false)))
  if (filter.q !== null) parts.push(`a name like “${filter.q}”`)
  if (filter.cone) parts.push(coneWords(filter.cone))
  if (filter.within) parts.push(withinWords(filter.within, labels))
  return [subject.words, ...parts].join(', ')
}

/** What the sentence is about, and the conditions that it tells already. */
function subjectOf({ conditions }: Filter, labels: FilterLabels): { words: string; told: string[] } {
  const told: string[] = []
  const values = (key: string): readonly string[] => {
    const condition: Condition | undefined = conditions[key]
    if (condition?.kind !== 'list' || condition.exclude) return []
    told.push(key)
    return condition.values
  }
  const status = values('status')
  const hosts = values('host')
  const relation = hosts.length === 0 ? values('host_relation') : []
  const noun = relation.length === 1 && relation[0] !== 'field' ? `${relation[0] ?? ''}s` : hosts.length > 0 ? 'satellites' : 'galaxies'
  const where = hosts.length > 0 ? ` of ${inList(hosts.map((slug) => valueWords('host', slug, labels)), 'or')}` : ''
  const others = relation.length === 1 && relation[0] === 'field' ? ' in the field' : ''
  if (relation.length > 1) told.splice(told.indexOf('host_relation'), 1)
  const words = `${status.length > 0 ? `${inList(status, 'or')} ` : ''}${noun}${where}${others}`
  return { words: words.charAt(0).toUpperCase() + words.slice(1), told }
}

export interface FilterChip {
  /** Names the chip among the others. */
  key: string
  /** "Ostrel", "distance 2 to 5 Mpc" */
  label: string
  /** The filter without it, at its first page. */
  without: Filter
}

/** A filter as chips that can each be taken away: a value of a list is a chip of its own, everything else one a condition. */
export function filterChips(filter: Filter, labels: FilterLabels = {}): FilterChip[] {
  const chips: FilterChip[] = []
  const first: Filter = { ...filter, cursor: null }
  const add = (key: string, label: string, without: Partial<Filter>): void => {
    chips.push({ key, label, without: { ...first, ...without } })
  }
  for (const { key } of COLUMNS) {
    const condition = filter.conditions[key]
    if (condition) for (const chip of conditionChips(key, condition, labels)) add(chip.key, chip.label, { conditions: replaced(filter, key, chip.left) })
  }
  for (const key of filter.has) add(`has ${key}`, presenceWords(key, true), { has: filter.has.filter((other) => other !== key) })
  for (const key of filter.lacks) add(`lacks ${key}`, presenceWords(key, false), { lacks: filter.lacks.filter((other) => other !== key) })
  if (filter.q !== null) add('q', `“${filter.q}”`, { q: null })
  if (filter.cone) add('cone', coneWords(filter.cone), { cone: null })
  if (filter.within) add('within', withinWords(filter.within, labels), { within: null })
  return chips
}

function conditionChips(key: string, condition: Condition, labels: FilterLabels): { key: string; label: string; left: Condition | null }[] {
  if (condition.kind === 'list') {
    return condition.values.map((value) => {
      const values = condition.values.filter((other) => other !== value)
      const words = valueWords(key, value, labels)
      return { key: `${key} ${value}`, label: condition.exclude ? `not ${words}` : words, left: values.length > 0 ? { ...condition, values } : null }
    })
  }
  const column = columnOf(key)
  if (condition.kind === 'numbers' && condition.ranges.length > 1 && column) {
    return condition.ranges.map((range, i) => ({
      key: `${key} ${i}`,
      label: `${columnWords(column)} ${condition.exclude ? 'not ' : ''}${rangeWords(range, column)}`,
      left: { ...condition, ranges: condition.ranges.filter((_, j) => j !== i) },
    }))
  }
  return [{ key, label: conditionWords(key, condition, labels), left: null }]
}

function replaced({ conditions }: Filter, key: string, condition: Condition | null): Filter['conditions'] {
  const { [key]: _old, ...others } = conditions
  return condition ? { ...others, [key]: condition } : others
}
