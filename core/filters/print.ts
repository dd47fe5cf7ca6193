/** From a filter to query parameters: one canonical spelling a filter, so that links, cache keys and ETags agree. */
import { COLUMNS } from '../columns.ts'
import type { Condition, Filter } from './filter.ts'
import { joinList, printRange } from './ranges.ts'

/** Conditions in the order of the column registry, then the rest; `parseFilter` of it gives the filter back. */
export function printFilter(filter: Filter): URLSearchParams {
  const parameters = new URLSearchParams()
  const set = (key: string, value: string | number | null): void => {
    if (value !== null && value !== '') parameters.set(key, String(value))
  }
  for (const { key } of COLUMNS) {
    const condition = filter.conditions[key]
    if (condition) set(key, printCondition(condition))
  }
  set('has', joinList(filter.has))
  set('lacks', joinList(filter.lacks))
  set('q', filter.q)
  set('cone', filter.cone && [filter.cone.ra, filter.cone.dec, filter.cone.radius].join(','))
  set('within', filter.within && [filter.within.host, filter.within.radius].join(','))
  set('columns', filter.columns && joinList(filter.columns))
  set('sort', filter.sort.map((key) => `${key.descending ? '-' : ''}${key.column}`).join(','))
  set('limit', filter.limit)
  set('cursor', filter.cursor)
  set('at', filter.at)
  return parameters
}

function printCondition(condition: Condition): string {
  const body = condition.kind === 'list' ? joinList(condition.values) : condition.ranges.map((range) => printRange<string | number>(range)).join(',')
  return `${condition.exclude ? '!' : ''}${body}`
}
